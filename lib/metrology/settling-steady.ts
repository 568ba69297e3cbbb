import type { DisplayRange } from "@/lib/schemas/instrument";
import type { UntilSteady } from "@/lib/schemas/settling";
import type { ExponentialOutlook } from "./exponential";
import type { SettlingAssessment, SettlingWatch } from "./settling";
import { displayStepOhms, plateausOf, valuesInRange, type DisplayValue, type Plateau } from "./settling-trace";
import {
  missingSentence,
  overRangeSentence,
  settledSentence,
  unsettledSentence,
  type MissingCondition,
} from "./settling-words";
import { fitSmooth } from "./smooth-fit";
import { fitLine, mean } from "./statistics";
import { fitStepped } from "./stepped-fit";

/** A point has arrived when its value lies this near to its expected end (as a fraction), or within half a display step. */
export const ARRIVED_FRACTION = 0.005;
/** How sure the fit must be of that. */
const SURE = 0.95;
/** Without a fit the display must stand for three times the longest interval between its steps. */
const HOLD_FACTOR = 3;
/** An expected end with a larger relative uncertainty is not worth showing. */
const SHOWN_UNCERTAINTY = 0.2;
/** The fit looks at the last part of the way, from this far off the present value: what went before may have had another course. */
const FITTED_PART = 0.2;
/** And not at the first part of the time, so that no beginning, however odd, is held against a trace for ever. */
const FORGOTTEN_PART = 0.1;
/** But at so many values or plateaus, as far as there are any. */
const FITTED_VALUES = 8;
const FITTED_PLATEAUS = 3;
/** A display this many times coarser than the scatter about the fit is read as plateaus. */
const COARSE = 2;

/** Less than any resistance tester shows; keeps ratios finite at zero. */
const LEAST_OHMS = 1e-6;

interface Reading {
  values: DisplayValue[];
  /** The watching window: the latest of the values. */
  window: DisplayValue[];
  elapsed: number;
  /** What everything relative is relative to: the shown value, or the display's step where that is larger. */
  scaleOhms: number;
  /** Display step relative to the scale. */
  step: number;
  outlook: ExponentialOutlook | null;
}

/**
 * Until steady: over a window of several display updates the spread is within the policy or one display step, the drift
 * within the policy or half a step, and the value has arrived where an exponential fit expects the trace to end.
 *
 * Where no exponential fits, the window is at least three times the longest interval between display steps so far.
 * At the greatest wait the point is unsettled.
 */
export function assessSteadiness(watch: SettlingWatch, policy: UntilSteady): SettlingAssessment {
  const last = watch.samples.at(-1);
  if (!last || last.ohms === null) return assessOverRange(watch, policy);
  const reading = readTrace(watch, policy);
  const driftPercentPerMinute = driftOf(reading);
  const missing = missingConditions(watch, policy, reading, driftPercentPerMinute);
  const state = missing.length === 0 ? "settled" : reading.elapsed >= policy.mostSeconds ? "unsettled" : "watching";
  const shown = showOutlook(reading);
  const secondsToGo = state === "watching" ? forecastToGo(watch, policy, reading) : 0;
  return {
    state,
    progress: state === "watching" ? Math.min(0.99, reading.elapsed / (reading.elapsed + secondsToGo || 1)) : 1,
    driftPercentPerMinute,
    windowFromSeconds: reading.window[0]!.seconds,
    sentence: sentenceFor(state, policy, reading.elapsed, missing, shown.expectedOhms),
    ...shown,
    secondsToGo,
  };
}

function readTrace(watch: SettlingWatch, policy: UntilSteady): Reading {
  const values = valuesInRange(watch.samples);
  const { seconds: elapsed, ohms: shownOhms } = values.at(-1)!;
  const stepOhms = displayStepOhms(watch.ranges, shownOhms);
  const scaleOhms = Math.max(shownOhms, stepOhms, LEAST_OHMS);
  const step = stepOhms / scaleOhms;
  const outlook = predict(watch, values, scaleOhms, step);
  const least = Math.min(values.length, policy.displayUpdates);
  const from = outlook ? Infinity : elapsed - HOLD_FACTOR * watch.longestStepSeconds;
  const start = values.findIndex(({ seconds }, index) => index >= values.length - least || seconds >= from);
  return { values, window: values.slice(start), elapsed, scaleOhms, step, outlook };
}

/**
 * What the trace is heading for, by least squares; where the display is coarse, by its plateaus. A coarse display has
 * arrived when both say so: the plateaus know nothing of noise, least squares nothing of steps.
 */
function predict(watch: SettlingWatch, values: DisplayValue[], scaleOhms: number, step: number) {
  const common = {
    step,
    tolerance: toleranceFor(step),
    scaleOhms,
    plannedSeconds: watch.timeConstantSeconds,
  };
  const smooth = fitSmooth({ ...common, values: lastPart(values) });
  if (!smooth || step < ARRIVED_FRACTION || step < COARSE * smooth.scatter) return smooth;
  const stepped = fitStepped({
    ...common,
    plateaus: lastPlateaus(values, watch.ranges),
    fromSeconds: values[0]!.seconds,
    nowSeconds: values.at(-1)!.seconds,
  });
  if (!stepped) return smooth;
  return { ...stepped, arrivedProbability: Math.min(stepped.arrivedProbability, smooth.arrivedProbability) };
}

/** The larger of 0.5 % of the value and half a display step. */
function toleranceFor(step: number): number {
  return Math.max(ARRIVED_FRACTION, step / 2);
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

function missingConditions(
  watch: SettlingWatch,
  policy: UntilSteady,
  reading: Reading,
  driftPercentPerMinute: number | null,
): MissingCondition[] {
  const { values, window, elapsed, scaleOhms, step, outlook } = reading;
  const missing: MissingCondition[] = [];
  if (elapsed < policy.leastSeconds) missing.push("least-wait");
  if (values.length < policy.displayUpdates) missing.push("window");
  if (!outlook && elapsed - watch.lastStepSeconds < HOLD_FACTOR * watch.longestStepSeconds && step > ARRIVED_FRACTION) {
    missing.push("hold");
  }
  const driftBound = Math.max(policy.driftPercentPerMinute, 50 * step);
  if (driftPercentPerMinute === null || Math.abs(driftPercentPerMinute) > driftBound) missing.push("drift");
  const spread = spreadOf(window);
  if (spread > scaleOhms * Math.max(policy.spreadPercent / 100, 1.001 * step)) missing.push("spread");
  if (outlook && (outlook.arrivedProbability < SURE || !showsTheEnd(reading, outlook))) missing.push("approach");
  return missing;
}

/** Whether a display whose step counts already stands, on the mean of the window, where the trace is expected to end. */
function showsTheEnd({ window, scaleOhms, step }: Reading, { end }: ExponentialOutlook): boolean {
  if (step < ARRIVED_FRACTION / 2) return true;
  const shown = mean(window.map(({ ohms }) => ohms)) / scaleOhms;
  return Math.abs(end - shown) <= toleranceFor(step);
}

function spreadOf(window: readonly DisplayValue[]): number {
  const values = window.map(({ ohms }) => ohms);
  return Math.max(...values) - Math.min(...values);
}

function driftOf({ outlook, window, scaleOhms }: Reading): number | null {
  if (outlook) return 100 * outlook.minuteMovement;
  if (window.length < 3) return null;
  const { slope } = fitLine(
    window.map(({ seconds }) => seconds),
    window.map(({ ohms }) => ohms),
  );
  return (100 * 60 * slope) / scaleOhms;
}

function showOutlook({ outlook, scaleOhms }: Reading) {
  if (!outlook || outlook.endUncertainty > SHOWN_UNCERTAINTY || outlook.end <= 0) {
    return { expectedOhms: null, expectedUncertaintyOhms: null, fittedSeconds: null };
  }
  return {
    expectedOhms: outlook.end * scaleOhms,
    expectedUncertaintyOhms: outlook.endUncertainty * scaleOhms,
    fittedSeconds: outlook.timeConstantSeconds,
  };
}

/** Seconds until the fit expects arrival; by the planned time constant where there is no fit. */
function forecastToGo(watch: SettlingWatch, policy: UntilSteady, { values, elapsed, step, outlook }: Reading): number {
  const update = values.length < 2 ? 1 : elapsed - values.at(-2)!.seconds;
  const tolerance = toleranceFor(step);
  const approach = outlook
    ? outlook.timeConstantSeconds * Math.log((Math.abs(outlook.end - 1) + outlook.endUncertainty) / tolerance)
    : watch.timeConstantSeconds * Math.log(1 / ARRIVED_FRACTION) - elapsed;
  const window = (policy.displayUpdates - values.length) * update;
  const longest = Math.max(update, approach, window, policy.leastSeconds - elapsed);
  return Math.min(longest, Math.max(0, policy.mostSeconds - elapsed));
}

function sentenceFor(
  state: SettlingAssessment["state"],
  policy: UntilSteady,
  elapsed: number,
  missing: readonly MissingCondition[],
  expectedOhms: number | null,
): string {
  if (state === "settled") return settledSentence(elapsed);
  if (state === "unsettled") return unsettledSentence(policy);
  return missingSentence(missing, policy, expectedOhms);
}

/** A display that stays over its range has settled there once a trace from above would have come back into it. */
function assessOverRange(watch: SettlingWatch, policy: UntilSteady): SettlingAssessment {
  const elapsed = watch.samples.at(-1)?.seconds ?? 0;
  const over = watch.samples.slice(watch.samples.findLastIndex(({ ohms }) => ohms !== null) + 1);
  const patience = Math.max(policy.leastSeconds, watch.timeConstantSeconds * Math.log(1 / ARRIVED_FRACTION));
  const isSettled = over.length >= policy.displayUpdates && elapsed >= patience && over.length > 0;
  const state = isSettled ? "settled" : elapsed >= policy.mostSeconds ? "unsettled" : "watching";
  return {
    state,
    progress: state === "watching" ? Math.min(0.99, elapsed / (patience || 1)) : 1,
    driftPercentPerMinute: null,
    windowFromSeconds: over[0]?.seconds ?? 0,
    sentence:
      state === "unsettled"
        ? unsettledSentence(policy)
        : watch.samples.length === 0
          ? "Waiting for the first reading"
          : overRangeSentence(elapsed, isSettled),
    expectedOhms: null,
    expectedUncertaintyOhms: null,
    fittedSeconds: null,
    secondsToGo: state === "watching" ? Math.max(0, patience - elapsed) : 0,
  };
}
