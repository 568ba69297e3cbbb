import { existsSync, readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import config from "@/tailwind.config";

const css = readFileSync("app/globals.css", "utf8");
const [day, night] = tokensOf(css);

/** Tokens of the day block and of the night block within it. */
function tokensOf(text: string): [Record<string, string>, Record<string, string>] {
  const block = /\[data-theme\] \{\n {2}color-scheme: light;([\s\S]*?)\n\}/u.exec(text)![1]!;
  const [dayText = "", nightText = ""] = block.split("@variant night");
  const read = (part: string) =>
    Object.fromEntries([...part.matchAll(/--([\w-]+): (#[0-9a-f]{6});/gu)].map((match) => [match[1]!, match[2]!]));
  return [read(dayText), { ...read(dayText), ...read(nightText) }];
}

/** Relative luminance and contrast ratio: WCAG 2.2, definitions of «relative luminance» and «contrast ratio». */
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const channel = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red! + 0.7152 * green! + 0.0722 * blue!;
}

function contrast(first: string, second: string): number {
  const [light, dark] = [luminance(first), luminance(second)].sort((a, b) => b - a);
  return (light! + 0.05) / (dark! + 0.05);
}

/** Text and the ground that it stands on somewhere. */
const pairs: [ink: string, ground: string][] = [
  ...["ink", "ink-2", "water", "moss", "ochre", "brick", "plum"].flatMap((ink): [string, string][] => [
    [ink, "panel"],
    [ink, "ground"],
  ]),
  ["ink-2", "sunken"],
  ["ink", "water-tint"],
  ["ink-2", "water-tint"],
  ["moss", "moss-tint"],
  ["ochre", "ochre-tint"],
  ["brick", "brick-tint"],
  ["plum", "plum-tint"],
  ["water-ink", "water"],
  ["panel", "brick"],
  ["panel", "ink"],
  ["amber-text", "hatch-ink"],
  ["dial-ink", "dial"],
];

describe("the look's tokens", () => {
  // WCAG 2.2, success criterion 1.4.3 (AA): at least 4.5 : 1 for text.
  it.each(pairs)("%s on %s is legible by day and by night", (ink, ground) => {
    expect(contrast(day[ink]!, day[ground]!)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(night[ink]!, night[ground]!)).toBeGreaterThanOrEqual(4.5);
  });

  // WCAG's own worked case: black on white has the ratio 21 : 1.
  it("measures contrast as the standard does", () => {
    expect(contrast("#000000", "#ffffff")).toBeCloseTo(21);
  });

  it("are offered as colours of the same names", () => {
    const colours = config.theme?.colors as Record<string, string>;
    for (const token of Object.keys(day)) expect(colours[token]).toBe(`var(--${token})`);
  });
});

describe("the fonts", () => {
  it.each(readdirSync("fonts").filter((name) => name.endsWith(".woff2")))("%s ships with its licence", (name) => {
    const licence = `fonts/${name.replace(/(-greek)?\.woff2$/u, "")}-OFL.txt`;
    expect(existsSync(licence)).toBe(true);
    expect(readFileSync(licence, "utf8")).toMatch(/^Copyright .*\n[\s\S]*SIL OPEN FONT LICENSE Version 1\.1/u);
  });
});
