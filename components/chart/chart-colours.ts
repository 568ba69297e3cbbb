const TOKENS = {
  ink: "--ink",
  ink2: "--ink-2",
  ink3: "--ink-3",
  line: "--line",
  lineStrong: "--line-strong",
  panel: "--panel",
  water: "--water",
  moss: "--moss",
  mossTint: "--moss-tint",
  ochre: "--ochre",
  brick: "--brick",
  plum: "--plum",
  textFamily: "--text-family",
  monoFamily: "--mono-family",
} as const;

/** The theme's tokens as a canvas needs them. */
export type ChartColours = Record<keyof typeof TOKENS, string>;

export function readColours(element: Element): ChartColours {
  const style = getComputedStyle(element);
  const entries = Object.entries(TOKENS).map(([name, token]) => [name, style.getPropertyValue(token).trim()]);
  return Object.fromEntries(entries) as ChartColours;
}

/** Calls back when day and night change, by the switch or by the machine. Returns what ends the watching. */
export function watchTheme(onChange: () => void): () => void {
  const observer = new MutationObserver(onChange);
  observer.observe(document.documentElement, { attributeFilter: ["data-theme"] });
  const machine = window.matchMedia("(prefers-color-scheme: dark)");
  machine.addEventListener("change", onChange);
  return () => {
    observer.disconnect();
    machine.removeEventListener("change", onChange);
  };
}
