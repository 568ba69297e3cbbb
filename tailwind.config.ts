import type { Config } from "tailwindcss";

const tokens = [
  "ground",
  "panel",
  "sunken",
  "line",
  "line-strong",
  "ink",
  "ink-2",
  "ink-3",
  "water",
  "water-tint",
  "water-ink",
  "moss",
  "moss-tint",
  "ochre",
  "ochre-tint",
  "brick",
  "brick-tint",
  "plum",
  "plum-tint",
  "amber",
  "amber-text",
  "hatch-ink",
  "dial",
  "dial-ink",
] as const;

const colors = Object.fromEntries(tokens.map((token) => [token, `var(--${token})`]));

const config: Config = {
  content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}"],
  theme: {
    colors: { transparent: "transparent", current: "currentColor", inherit: "inherit", ...colors },
    borderRadius: { none: "0", DEFAULT: "2px" },
    fontFamily: { text: "var(--text-family)", mono: "var(--mono-family)" },
    fontSize: {
      label: ["0.78125rem", "1rem"],
      small: ["0.84375rem", "1.25rem"],
      text: ["0.9375rem", "1.375rem"],
      state: ["1.0625rem", "1.5rem"],
      band: ["1.3125rem", "1.75rem"],
      title: ["1.5rem", "1.875rem"],
      time: ["1.75rem", "2rem"],
      indication: ["3.375rem", "3.5rem"],
    },
  },
};

export default config;
