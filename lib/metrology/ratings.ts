import type { DecadeBoxRecord } from "@/lib/schemas/instrument";
import { formatQuantity, formatTestVolts } from "@/lib/units/format";
import { setDecades, type SetDecade } from "./decades";
import { requireNonNegative } from "./metrology-error";

/** What one part of a box would stand, beside what it is rated for. */
export interface Stress {
  /** `the box` or `the 100 kΩ decade`. */
  part: string;
  quantity: "volts" | "amperes" | "watts";
  value: number;
  rated: number;
}

/** Keeps a stress that equals its rating from failing by the rounding of a division. */
const ROUNDING = 1 + 1e-9;

/**
 * What one decade of a setting stands: V_i = V·R_i/R, I = V/R and P_i = I²·R_i, where R is the whole setting.
 * A dial at zero carries the current through its switch alone and stands nothing.
 *
 * Shape: a set decade, R in ohms, V in volts -> stresses in volts, amperes and watts.
 * Source: Ohm's law; 250 V across 250 kΩ give 1 mA and 0.25 W.
 */
export function decadeStresses({ decade, nominalOhms }: SetDecade, totalOhms: number, highestVolts: number): Stress[] {
  if (nominalOhms === 0) return [];
  const amperes = highestVolts / totalOhms;
  const part = `the ${formatStep(decade.stepOhms)} decade`;
  return [
    { part, quantity: "volts", value: amperes * nominalOhms, rated: decade.ratedVolts },
    { part, quantity: "amperes", value: amperes, rated: decade.ratedAmperes },
    { part, quantity: "watts", value: amperes ** 2 * nominalOhms, rated: decade.ratedWatts },
  ];
}

/** Whether a stress is beyond its rating. */
export function isBeyondRating({ value, rated }: Stress): boolean {
  return value > rated * ROUNDING;
}

/**
 * Null when the ratings of the box and of each decade cover the setting with `highestVolts` across the box; else the
 * worst excess in words with numbers: `the 100 kΩ decade would stand 4.0 W, rated 1.0 W`.
 *
 * With every dial at zero the box is a short circuit, which any voltage overloads.
 * Throws MetrologyError for a position that the box lacks or a voltage that is negative or not finite.
 */
export function checkRating(box: DecadeBoxRecord, positions: readonly number[], highestVolts: number): string | null {
  requireNonNegative("highestVolts", highestVolts);
  const decades = setDecades(box, positions);
  const totalOhms = decades.reduce((sum, { nominalOhms }) => sum + nominalOhms, 0);
  if (totalOhms === 0 && highestVolts > 0) return `every dial at zero would short ${formatTestVolts(highestVolts)}`;
  const whole: Stress = { part: "the box", quantity: "volts", value: highestVolts, rated: box.ratedVolts };
  const parts = decades.flatMap((decade) => decadeStresses(decade, totalOhms, highestVolts));
  const beyond = [whole, ...parts].filter(isBeyondRating);
  if (beyond.length === 0) return null;
  const worst = beyond.reduce((worse, stress) => (excessOf(stress) > excessOf(worse) ? stress : worse));
  return `${worst.part} would stand ${inWords(worst, worst.value)}, rated ${inWords(worst, worst.rated)}`;
}

function excessOf({ value, rated }: Stress): number {
  return value / rated;
}

/** A step is one digit and a power of ten: `100 kΩ`, never `100.0 kΩ`. */
function formatStep(stepOhms: number): string {
  return formatQuantity(stepOhms, "Ω", { digits: 1 });
}

function inWords({ quantity }: Stress, value: number): string {
  if (quantity === "volts") return formatTestVolts(value);
  return formatQuantity(value, quantity === "watts" ? "W" : "A", { digits: 2 });
}
