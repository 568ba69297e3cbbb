/** U+2009, set between a number and its unit (ISO 80000-1, 7.1.4 asks for a space). */
export const THIN_SPACE = "\u2009";
/** U+2212: a minus as wide as the digits. */
export const MINUS = "\u2212";

/** Stands for a number that is none. */
export const NO_VALUE = "–";

/** Micro is U+03BC, the Greek letter that our fonts carry. */
const PREFIXES: ReadonlyMap<number, string> = new Map([
  [-15, "f"],
  [-12, "p"],
  [-9, "n"],
  [-6, "μ"],
  [-3, "m"],
  [0, ""],
  [3, "k"],
  [6, "M"],
  [9, "G"],
  [12, "T"],
]);

export interface FormatOptions {
  /** Significant digits shown, trailing zeros kept. Default 4. */
  digits?: number;
  /** Shows a plus before positive values. */
  signed?: boolean;
}

/** Significant decimal digits and exponent of a positive number, rounded once, without a binary artefact. */
function decimalParts(value: number, digits: number): { figures: string; exponent: number } {
  const [mantissa = "0", exponent = "0"] = value.toExponential(digits - 1).split("e");
  return { figures: mantissa.replace(".", ""), exponent: Number(exponent) };
}

function placePoint(figures: string, integerDigits: number): string {
  if (integerDigits <= 0) return `0.${"0".repeat(-integerDigits)}${figures}`;
  if (integerDigits >= figures.length) return figures.padEnd(integerDigits, "0");
  return `${figures.slice(0, integerDigits)}.${figures.slice(integerDigits)}`;
}

/** Number and prefixed unit of a quantity, apart, for layouts that set them differently: `{ number: "10.00", unit: "GΩ" }`. */
export function engineeringParts(
  value: number,
  unit: string,
  options: FormatOptions = {},
): { number: string; unit: string } {
  const { digits = 4, signed = false } = options;
  if (!Number.isFinite(value)) return { number: NO_VALUE, unit: "" };
  const sign = value < 0 ? MINUS : signed && value > 0 ? "+" : "";
  if (value === 0) return { number: "0", unit };
  const { figures, exponent } = decimalParts(Math.abs(value), digits);
  const power = Math.min(12, Math.max(-15, Math.floor(exponent / 3) * 3));
  return { number: sign + placePoint(figures, exponent - power + 1), unit: `${PREFIXES.get(power) ?? ""}${unit}` };
}

/** Engineering notation with SI prefix and thin space, for example `10.00 GΩ` or `−0.32 nA`. */
export function formatQuantity(value: number, unit: string, options: FormatOptions = {}): string {
  if (!Number.isFinite(value)) return NO_VALUE;
  const parts = engineeringParts(value, unit, options);
  return `${parts.number}${THIN_SPACE}${parts.unit}`;
}

/** Resistance in engineering notation with as many digits as `resolutionOhms` supports (two to six), or four without it. */
export function formatOhms(value: number, resolutionOhms?: number): string {
  return formatQuantity(value, "Ω", { digits: digitsFor(value, resolutionOhms) });
}

/** Significant digits that a display step leaves in a value, held between 2 and 6. Without a step: 4. */
export function digitsFor(value: number, resolution?: number): number {
  if (!resolution || !Number.isFinite(value) || value === 0) return 4;
  return Math.min(6, Math.max(2, exponentOf(Math.abs(value)) - exponentOf(resolution) + 1));
}

function exponentOf(value: number): number {
  return Math.floor(Math.log10(value) + 1e-9);
}

/** Test voltage in whole or tenth volts, never with a prefix, as the trade writes it: `1000 V`. */
export function formatTestVolts(value: number): string {
  if (!Number.isFinite(value)) return NO_VALUE;
  return `${trueMinus(String(Math.round(value * 10) / 10))}${THIN_SPACE}V`;
}

/** Voltage at the terminals in volts, to a whole volt from 100 V up and a tenth below. */
export function formatTerminalVolts(value: number): string {
  if (!Number.isFinite(value)) return NO_VALUE;
  const text = value.toFixed(Math.abs(value) >= 99.95 ? 0 : 1);
  return `${Number(text) === 0 ? "0.0" : trueMinus(text)}${THIN_SPACE}V`;
}

/** Signed per cent with a true minus: `−3.58`. Without the sign `%`, which tables carry in their head. */
export function formatErrorPercent(value: number, decimals = 2): string {
  if (!Number.isFinite(value)) return NO_VALUE;
  const text = Math.abs(value).toFixed(decimals);
  if (Number(text) === 0) return text;
  return `${value < 0 ? MINUS : "+"}${text}`;
}

/** Duration in text: `48 s`, `17 min`, `1 h 05 min`. */
export function formatDuration(seconds: number): string {
  if (!Number.isFinite(seconds)) return NO_VALUE;
  const whole = Math.max(0, Math.round(seconds));
  if (whole < 60) return `${whole}${THIN_SPACE}s`;
  const minutes = Math.round(whole / 60);
  if (minutes < 60) return `${minutes}${THIN_SPACE}min`;
  return `${Math.floor(minutes / 60)}${THIN_SPACE}h ${String(minutes % 60).padStart(2, "0")}${THIN_SPACE}min`;
}

/** Duration to the second: `21 min 40 s`, `1 h 05 min 09 s`. */
export function formatExactDuration(seconds: number): string {
  if (!Number.isFinite(seconds)) return NO_VALUE;
  const whole = Math.max(0, Math.floor(seconds));
  const h = Math.floor(whole / 3600);
  const min = Math.floor((whole % 3600) / 60);
  const s = String(whole % 60).padStart(h || min ? 2 : 1, "0");
  return [h ? `${h} h` : "", h || min ? `${String(min).padStart(h ? 2 : 1, "0")} min` : "", `${s} s`]
    .filter(Boolean)
    .join(" ");
}

function trueMinus(text: string): string {
  return text.replace("-", MINUS);
}
