import { ohms, volts, type Ohms, type Volts } from "./quantities";

export type Parsed<T> = { ok: true; value: T } | { ok: false; message: string };

/** Powers of ten of the prefixes as people type them; m is milli and M is mega, elsewhere case is forgiven. */
const EXPONENTS: ReadonlyMap<string, number> = new Map([
  ["", 0],
  ["f", -15],
  ["p", -12],
  ["n", -9],
  ["u", -6],
  ["\u00b5", -6],
  ["\u03bc", -6],
  ["m", -3],
  ["k", 3],
  ["K", 3],
  ["M", 6],
  ["MEG", 6],
  ["Meg", 6],
  ["meg", 6],
  ["G", 9],
  ["g", 9],
  ["T", 12],
  ["t", 12],
]);

const QUANTITY = /^([+\-\u2212]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+\-\u2212]?\d+)?)\s*([a-zµμ]*?)$/iu;

/**
 * Reads engineering notation as people type it: `2.2G`, `500 kΩ`, `1e9`, `10 MOhm`, `1,5 GΩ`.
 *
 * `unitNames` lists the accepted spellings of the unit, longest first; the unit may be left out.
 * The decimal exponent is applied to the text, so no binary artefact arises.
 */
export function parseQuantity(text: string, unitNames: readonly string[], what: string): Parsed<number> {
  const trimmed = text.trim().replace(/\s+/gu, " ");
  if (trimmed === "") return { ok: false, message: `Enter ${what}.` };
  const bare = stripUnit(trimmed, unitNames);
  const match = QUANTITY.exec(bare);
  const exponent = match ? EXPONENTS.get(match[2] ?? "") : undefined;
  if (!match || exponent === undefined) return { ok: false, message: `“${text.trim()}” is not ${what}.` };
  const [mantissa = "", power = "0"] = match[1]!.replace(",", ".").replaceAll("\u2212", "-").split(/e/i);
  const value = Number(`${mantissa}e${Number(power) + exponent}`);
  return Number.isFinite(value) ? { ok: true, value } : { ok: false, message: `“${text.trim()}” is too large.` };
}

function stripUnit(text: string, unitNames: readonly string[]): string {
  const lower = text.toLowerCase();
  const unit = unitNames.find((name) => lower.endsWith(name.toLowerCase()));
  return unit ? text.slice(0, text.length - unit.length).trimEnd() : text;
}

/** The marking of resistors, where the prefix stands for the decimal point: `4k7`, `2R2`, `10R` (IEC 60062; from memory). */
const RESISTOR_MARKING = /^(\d+)([RkKMGT])(\d*)(?=$|\s|\u03a9|\u2126)/u;

/** Reads a resistance above zero, for example `1.5 GΩ` or `4k7`. */
export function parseOhms(text: string): Parsed<Ohms> {
  const plain = text.trim().replace(RESISTOR_MARKING, (_, whole: string, prefix: string, rest: string) => {
    return `${whole}.${rest}${prefix === "R" ? "" : prefix}`;
  });
  // Lower case makes one letter of the Greek omega and the ohm sign.
  const parsed = parseQuantity(plain, ["ohms", "ohm", "\u03a9"], "a resistance such as 10 MΩ");
  if (!parsed.ok) return parsed;
  return parsed.value > 0
    ? { ok: true, value: ohms(parsed.value) }
    : { ok: false, message: "A resistance is more than 0 Ω." };
}

/** Reads a test voltage above zero, for example `500 V` or `1 kV`. */
export function parseVolts(text: string): Parsed<Volts> {
  const parsed = parseQuantity(text, ["volts", "volt", "V"], "a voltage such as 500 V");
  if (!parsed.ok) return parsed;
  return parsed.value > 0
    ? { ok: true, value: volts(parsed.value) }
    : { ok: false, message: "A test voltage is more than 0 V." };
}

/** Splits a typed or pasted list at line ends, semicolons, tabs, and commas that are followed by a space. */
export function splitList(text: string): string[] {
  return text
    .split(/[\n;\t]|,(?=\s)/u)
    .map((part) => part.trim())
    .filter(Boolean);
}
