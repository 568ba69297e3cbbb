import type { DisplayRange } from "@/lib/schemas/instrument";
import type { ExponentialOutlook } from "./exponential";
import type { SettlingWatch } from "./settling";
import { plateausOf, type DisplayValue, type Plateau } from "./settling-trace";
import { fitSmooth } from "./smooth-fit";
import { fitStepped } from "./stepped-fit";

/** A point has arrived when its value lies this near to its expected end (as a fraction), or within half a display step. */
export const ARRIVED_FRACTION = 0.005;
/** The fit looks at the last part of the way, from this far off the present value: what went before may have had another course. */
const FITTED_PART = 0.2;
/** And not at the first part of the time, so that no beginning, however odd, is held against a trace for ever. */
const FORGOTTEN_PART = 0.1;
/** But at so many values or plateaus, as far as there are any. */
const FITTED_VALUES = 8;
const FITTED_PLATEAUS = 3;
/** A display this many times coarser than the scatter about the fit is read as plateaus. */
const COARSE = 2;

/** What a trace is heading for, and whether the fit that says so explains the display. */
export interface Outlook extends ExponentialOutlook {
  /** False for a coarse display whose steps no exponential passes through. */
  isTrustworthy: boolean;
}

/** The larger of 0.5 % of the value and half a display step; `step` is relative to the value. */
export function toleranceFor(step: number): number {
  return Math.max(ARRIVED_FRACTION, step / 2);
}

/**
 * What the trace is heading for, by least squares; where the display is coarse, by its plateaus. A coarse display has
 * arrived when both say so: the plateaus know nothing of noise, least squares nothing of steps.
 *
 * Shape: display values in ohms in order of time, scale in ohms, display step relative to it -> an outlook relative to
 * the scale; null with fewer than three values.
 */
export function foresee(
  watch: SettlingWatch,
  values: readonly DisplayValue[],
  scaleOhms: number,
  step: number,
): Outlook | null {
  const common = { step, tolerance: toleranceFor(step), scaleOhms, plannedSeconds: watch.timeConstantSeconds };
  const smooth = fitSmooth({ ...common, values: lastPart(values) });
  if (!smooth || step < ARRIVED_FRACTION || step < COARSE * smooth.scatter) {
    return smooth && { ...smooth, isTrustworthy: true };
  }
  const stepped = fitStepped({
    ...common,
    plateaus: lastPlateaus(values, watch.ranges),
    fromSeconds: values[0]!.seconds,
    nowSeconds: values.at(-1)!.seconds,
  });
  if (!stepped) return { ...smooth, isTrustworthy: false };
  const arrivedProbability = Math.min(stepped.arrivedProbability, smooth.arrivedProbability);
  return { ...stepped, arrivedProbability, isTrustworthy: true };
}

/** The values of the last part of the way and of the time. */
function lastPart(values: readonly DisplayValue[]): readonly DisplayValue[] {
  const { ohms: shownOhms, seconds: elapsed } = values.at(-1)!;
  const isBefore = ({ ohms, seconds }: DisplayValue) =>
    Math.abs(ohms - shownOhms) > FITTED_PART * shownOhms || seconds < FORGOTTEN_PART * elapsed;
  const before = values.findLastIndex(isBefore);
  return values.slice(Math.max(0, Math.min(before + 1, values.length - FITTED_VALUES)));
}

/** The plateaus of the last part of the time. */
function lastPlateaus(values: readonly DisplayValue[], ranges: readonly DisplayRange[]): Plateau[] {
  const plateaus = plateausOf(values, ranges);
  const begin = FORGOTTEN_PART * values.at(-1)!.seconds;
  const first = plateaus.findIndex(({ toSeconds }) => toSeconds >= begin);
  return plateaus.slice(Math.max(0, Math.min(first, plateaus.length - FITTED_PLATEAUS)));
}
