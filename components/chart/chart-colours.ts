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

/** What changes the tokens besides the switch: the machine's day and night, and paper. */
const MEDIA = ["(prefers-color-scheme: dark)", "print"];

/** Calls back when the tokens change. Returns what ends the watching. */
export function watchTheme(onChange: () => void): () => void {
  const observer = new MutationObserver(onChange);
  observer.observe(document.documentElement, { attributeFilter: ["data-theme"] });
  const queries = MEDIA.map((query) => window.matchMedia(query));
  for (const query of queries) query.addEventListener("change", onChange);
  return () => {
    observer.disconnect();
    for (const query of queries) query.removeEventListener("change", onChange);
  };
}
