import type { UntilSteady } from "@/lib/schemas/settling";
import type { ExponentialOutlook } from "./exponential";
import type { SettlingAssessment, SettlingWatch } from "./settling";
import { displayStepOhms, plateausOf, valuesInRange, type DisplayValue } from "./settling-trace";
import {
  missingSentence,
  overRangeSentence,
  settledSentence,
  unsettledSentence,
  type MissingCondition,
} from "./settling-words";
import { fitSmooth } from "./smooth-fit";
import { fitLine } from "./statistics";
import { fitStepped } from "./stepped-fit";

/** A point has arrived when its value lies this near to its expected end (as a fraction), or within half a display step. */
export const ARRIVED_FRACTION = 0.005;
/** How sure the fit must be of that. */
const SURE = 0.97;
/** Without a fit the display must stand for three times the longest interval between its steps. */
const HOLD_FACTOR = 3;
/** An expected end with a larger relative uncertainty is not worth showing. */
const SHOWN_UNCERTAINTY = 0.2;
/** The fit looks at the last part of the way, from this far off the present value: what went before may have had another course. */
const FITTED_PART = 0.2;
/** But at so many values, as far as there are any. */
const FITTED_VALUES = 8;
/** A display this many times coarser than the scatter about the fit is read as plateaus. */
const COARSE = 2;

interface Reading {
  values: DisplayValue[];
  /** The watching window: the latest of the values. */
  window: DisplayValue[];
  elapsed: number;
  shownOhms: number;
  /** Display step relative to the value. */
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
  const step = displayStepOhms(watch.ranges, shownOhms) / (shownOhms || 1);
  const outlook = predict(watch, values, step);
  const least = Math.min(values.length, policy.displayUpdates);
  const from = outlook ? Infinity : elapsed - HOLD_FACTOR * watch.longestStepSeconds;
  const start = values.findIndex(({ seconds }, index) => index >= values.length - least || seconds >= from);
  return { values, window: values.slice(start), elapsed, shownOhms, step, outlook };
}

/** What the trace is heading for: by plateaus where the display is coarse, by least squares where it is fine. */
function predict(watch: SettlingWatch, values: DisplayValue[], step: number): ExponentialOutlook | null {
  const shownOhms = values.at(-1)!.ohms;
  if (shownOhms === 0) return null;
  const tolerance = Math.max(ARRIVED_FRACTION, step / 2);
  const plannedSeconds = watch.timeConstantSeconds;
  const smooth = fitSmooth({ values: lastPart(values), step, tolerance, plannedSeconds });
  if (!smooth || step < COARSE * smooth.scatter) return smooth;
  const stepped = fitStepped({
    plateaus: plateausOf(values, watch.ranges),
    fromSeconds: values[0]!.seconds,
    nowSeconds: values.at(-1)!.seconds,
    shownOhms,
    step,
    tolerance,
    plannedSeconds,
  });
  return stepped ?? smooth;
}

function lastPart(values: readonly DisplayValue[]): readonly DisplayValue[] {
  const shownOhms = values.at(-1)!.ohms;
  const before = values.findLastIndex(({ ohms }) => Math.abs(ohms - shownOhms) > FITTED_PART * shownOhms);
  return values.slice(Math.max(0, Math.min(before + 1, values.length - FITTED_VALUES)));
}

function missingConditions(
  watch: SettlingWatch,
  policy: UntilSteady,
  reading: Reading,
  driftPercentPerMinute: number | null,
): MissingCondition[] {
  const { values, window, elapsed, shownOhms, step, outlook } = reading;
  const missing: MissingCondition[] = [];
  if (elapsed < policy.leastSeconds) missing.push("least-wait");
  if (values.length < policy.displayUpdates) missing.push("window");
  if (!outlook && elapsed - watch.lastStepSeconds < HOLD_FACTOR * watch.longestStepSeconds && step > ARRIVED_FRACTION) {
    missing.push("hold");
  }
  const driftBound = Math.max(policy.driftPercentPerMinute, 50 * step);
  if (driftPercentPerMinute === null || Math.abs(driftPercentPerMinute) > driftBound) missing.push("drift");
  const spread = spreadOf(window);
  if (spread > Math.max((policy.spreadPercent / 100) * shownOhms, 1.001 * step * shownOhms)) missing.push("spread");
  if (outlook && outlook.arrivedProbability < SURE) missing.push("approach");
  return missing;
}

function spreadOf(window: readonly DisplayValue[]): number {
  const values = window.map(({ ohms }) => ohms);
  return Math.max(...values) - Math.min(...values);
}

function driftOf({ outlook, window, shownOhms }: Reading): number | null {
  if (outlook) return 100 * outlook.minuteMovement;
  if (window.length < 3 || shownOhms === 0) return null;
  const { slope } = fitLine(
    window.map(({ seconds }) => seconds),
    window.map(({ ohms }) => ohms),
  );
  return (100 * 60 * slope) / shownOhms;
}

function showOutlook({ outlook, shownOhms }: Reading) {
  if (!outlook || outlook.endUncertainty > SHOWN_UNCERTAINTY || outlook.end <= 0) {
    return { expectedOhms: null, expectedUncertaintyOhms: null, fittedSeconds: null };
  }
  return {
    expectedOhms: outlook.end * shownOhms,
    expectedUncertaintyOhms: outlook.endUncertainty * shownOhms,
    fittedSeconds: outlook.timeConstantSeconds,
  };
}

/** Seconds until the fit expects arrival; by the planned time constant where there is no fit. */
function forecastToGo(watch: SettlingWatch, policy: UntilSteady, { values, elapsed, step, outlook }: Reading): number {
  const update = values.length < 2 ? 1 : elapsed - values.at(-2)!.seconds;
  const tolerance = Math.max(ARRIVED_FRACTION, step / 2);
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
