import type { AccuracyRow, DisplayRange } from "@/lib/schemas/instrument";
import type { StatedLimit } from "@/lib/schemas/plan";
import { MetrologyError, requireNonNegative, requirePositive } from "./metrology-error";

const OHMS_PER_GIGAOHM = 1e9;

/**
 * Least step of the display at a value: the resolution of the lowest range that holds it. Above the top range the
 * top range's step, which is what an overload is compared with.
 *
 * Shape: ranges in rising order, a resistance in ohms -> ohms.
 * Throws MetrologyError without ranges and for a resistance that is negative or not finite.
 */
export function displayResolutionOhms(ranges: readonly DisplayRange[], ohms: number): number {
  requireNonNegative("ohms", ohms);
  const range = ranges.find(({ toOhms }) => ohms <= toOhms) ?? ranges.at(-1);
  if (!range) throw new MetrologyError("ranges", "must hold at least one display range");
  return range.resolutionOhms;
}

/**
 * Limit of the accuracy statement at the value X: a·X/100 + n·d + c·(X / 1 GΩ)·X/100, where a is the per cent of
 * reading, n the digits, d the display's resolution at X and c the per cent per gigaohm.
 *
 * Shape: rows, display ranges, test voltage in volts, X in ohms -> limit in ohms (half-width) and the row that gave it.
 * A row speaks only from its `fromOhms` to its `toOhms`; where two rows meet, the first one in the statement holds.
 * Null where no row speaks of this voltage and value.
 * Throws MetrologyError for a negative or non-finite value and a voltage that is not above zero.
 */
export function statedLimit(
  rows: readonly AccuracyRow[],
  ranges: readonly DisplayRange[],
  testVolts: number,
  ohms: number,
): StatedLimit | null {
  requirePositive("testVolts", testVolts);
  requireNonNegative("ohms", ohms);
  const index = rows.findIndex((row) => speaksOf(row, testVolts, ohms));
  const row = rows[index];
  if (!row) return null;
  const percent = row.percentOfReading + (row.percentPerGigaohm * ohms) / OHMS_PER_GIGAOHM;
  const limitOhms = (percent * ohms) / 100 + row.digits * displayResolutionOhms(ranges, ohms);
  return { limitOhms: requireNonNegative(`rows[${index}]`, limitOhms), row: index };
}

/**
 * Limit at the first of several values that the statement speaks of; null when it speaks of none.
 *
 * The values are tried in order: an indication may lie just beyond a row's end while the resistance that was
 * connected lies inside it, and a reading that is too high must not escape its limit that way.
 */
export function firstStatedLimit(
  rows: readonly AccuracyRow[],
  ranges: readonly DisplayRange[],
  testVolts: number,
  values: readonly number[],
): StatedLimit | null {
  for (const ohms of values) {
    const limit = statedLimit(rows, ranges, testVolts, ohms);
    if (limit) return limit;
  }
  return null;
}

function speaksOf(row: AccuracyRow, testVolts: number, ohms: number): boolean {
  const isVoltageStated = row.testVolts.length === 0 || row.testVolts.some((volts) => volts === testVolts);
  return isVoltageStated && ohms >= row.fromOhms && ohms <= row.toOhms;
}
