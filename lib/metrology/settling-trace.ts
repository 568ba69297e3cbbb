import type { DisplayRange } from "@/lib/schemas/instrument";
import { displayResolutionOhms } from "./accuracy";
import type { SettlingSample } from "./settling";

/** Samples that a watch holds at most. */
export const KEPT_SAMPLES = 256;

/** A display value with its time; never over range. */
export interface DisplayValue {
  seconds: number;
  ohms: number;
}

/** A stretch of time over which the display did not change: the quantity lay between `leastOhms` and `mostOhms`. */
export interface Plateau {
  fromSeconds: number;
  toSeconds: number;
  leastOhms: number;
  mostOhms: number;
}

/** The samples with one more; when they are too many, every second one of the older half is dropped. */
export function joinSample(samples: readonly SettlingSample[], sample: SettlingSample): SettlingSample[] {
  const isRepeat = (samples.at(-1)?.seconds ?? -1) >= sample.seconds;
  const joined = [...(isRepeat ? samples.slice(0, -1) : samples), sample];
  if (joined.length <= KEPT_SAMPLES) return joined;
  const half = KEPT_SAMPLES / 2;
  return joined.filter((_, index) => index >= half || index % 2 === 0);
}

/** The display values since the display was last over its range. */
export function valuesInRange(samples: readonly SettlingSample[]): DisplayValue[] {
  const lastOver = samples.findLastIndex(({ ohms }) => ohms === null);
  return samples.slice(lastOver + 1) as DisplayValue[];
}

/** Width of the interval for which a display value stands; 0 where the display is not described. */
export function displayStepOhms(ranges: readonly DisplayRange[], ohms: number): number {
  return ranges.length === 0 ? 0 : displayResolutionOhms(ranges, ohms);
}

/** The display values as plateaus, oldest first. */
export function plateausOf(values: readonly DisplayValue[], ranges: readonly DisplayRange[]): Plateau[] {
  const plateaus: Plateau[] = [];
  let shown: number | null = null;
  for (const { seconds, ohms } of values) {
    const last = plateaus.at(-1);
    if (last && ohms === shown) last.toSeconds = seconds;
    else {
      const half = displayStepOhms(ranges, ohms) / 2;
      plateaus.push({ fromSeconds: seconds, toSeconds: seconds, leastOhms: ohms - half, mostOhms: ohms + half });
    }
    shown = ohms;
  }
  return plateaus;
}
