import type { UntilSteady } from "@/lib/schemas/settling";
import type { SettlingAssessment, SettlingWatch } from "./settling";
import { ARRIVED_FRACTION, foresee, toleranceFor, type Outlook } from "./settling-outlook";
import { displayStepOhms, valuesInRange, type DisplayValue } from "./settling-trace";
import {
  missingSentence,
  overRangeSentence,
  settledSentence,
  unsettledSentence,
  type MissingCondition,
} from "./settling-words";
import { mean } from "./statistics";

/** How sure the fit must be that the value has arrived. */
const SURE = 0.95;
/** Where no exponential explains a coarse display, it must stand for three times the longest interval between its steps. */
const HOLD_FACTOR = 3;
/** An expected end with a larger relative uncertainty is not worth showing. */
const SHOWN_UNCERTAINTY = 0.2;
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
  outlook: Outlook | null;
}

/**
 * Until steady: over a window of several display updates the spread is within the policy or one display step; what the
 * fit expects to move within the coming minute is within the policy or half a step; and the value has arrived where the
 * fit expects the trace to end.
 *
 * Where no exponential explains a coarse display, it must also have stood still for three times the longest interval
 * between its steps so far. At the greatest wait the point is unsettled.
 */
export function assessSteadiness(watch: SettlingWatch, policy: UntilSteady): SettlingAssessment {
  const last = watch.samples.at(-1);
  if (!last || last.ohms === null) return assessOverRange(watch, policy);
  const reading = readTrace(watch, policy);
  const driftPercentPerMinute = reading.outlook && 100 * reading.outlook.minuteMovement;
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
  const outlook = foresee(watch, values, scaleOhms, step);
  return { values, window: values.slice(-policy.displayUpdates), elapsed, scaleOhms, step, outlook };
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
  const heldSeconds = elapsed - watch.lastStepSeconds;
  if (outlook?.isTrustworthy === false && heldSeconds < HOLD_FACTOR * watch.longestStepSeconds) missing.push("hold");
  const driftBound = Math.max(policy.driftPercentPerMinute, 50 * step);
  if (driftPercentPerMinute === null || Math.abs(driftPercentPerMinute) > driftBound) missing.push("drift");
  const spread = spreadOf(window);
  if (spread > scaleOhms * Math.max(policy.spreadPercent / 100, 1.001 * step)) missing.push("spread");
  if (outlook && (outlook.arrivedProbability < SURE || !showsTheEnd(reading, outlook))) missing.push("approach");
  return missing;
}

/** Whether a display whose step counts already stands, on the mean of the window, where the trace is expected to end. */
function showsTheEnd({ window, scaleOhms, step }: Reading, { end }: Outlook): boolean {
  if (step < ARRIVED_FRACTION / 2) return true;
  const shown = mean(window.map(({ ohms }) => ohms)) / scaleOhms;
  return Math.abs(end - shown) <= toleranceFor(step);
}

function spreadOf(window: readonly DisplayValue[]): number {
  const values = window.map(({ ohms }) => ohms);
  return Math.max(...values) - Math.min(...values);
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
