import { MetrologyError, requirePositive } from "@/lib/metrology/metrology-error";

/**
 * Values of one decade, by series. E6, E12 and E24 after IEC 60063; 1-2-5 is the common coarse series.
 */
export const seriesMantissas = {
  "1-2-5": [1, 2, 5],
  E6: [1, 1.5, 2.2, 3.3, 4.7, 6.8],
  E12: [1, 1.2, 1.5, 1.8, 2.2, 2.7, 3.3, 3.9, 4.7, 5.6, 6.8, 8.2],
  E24: [
    1, 1.1, 1.2, 1.3, 1.5, 1.6, 1.8, 2, 2.2, 2.4, 2.7, 3, 3.3, 3.6, 3.9, 4.3, 4.7, 5.1, 5.6, 6.2, 6.8, 7.5, 8.2, 9.1,
  ],
} as const satisfies Record<string, readonly number[]>;

export type SeriesName = keyof typeof seriesMantissas;

/**
 * The values of a series from `fromValue` to `toValue`, both included where they belong to the series.
 *
 * Shape: two values in one unit -> rising list in that unit, free of binary artefacts (4.7 MΩ is 4700000).
 * Throws MetrologyError unless 0 < fromValue <= toValue.
 */
export function seriesBetween(series: SeriesName, fromValue: number, toValue: number): number[] {
  requirePositive("fromValue", fromValue);
  requirePositive("toValue", toValue);
  if (fromValue > toValue) throw new MetrologyError("fromValue", `must not exceed ${toValue}, got ${fromValue}`);
  const values: number[] = [];
  for (let power = exponentOf(fromValue); power <= exponentOf(toValue); power += 1) {
    // The exponent is joined as text: 4.7 · 10^6 by multiplication may carry a binary artefact.
    values.push(...seriesMantissas[series].map((mantissa) => Number(`${mantissa}e${power}`)));
  }
  return values.filter((value) => value >= fromValue && value <= toValue);
}

function exponentOf(value: number): number {
  return Number(value.toExponential().split("e")[1]);
}
