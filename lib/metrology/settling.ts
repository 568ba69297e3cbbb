import type { DisplayRange } from "@/lib/schemas/instrument";
import type { SettlingPolicy } from "@/lib/schemas/settling";
import { requireNonNegative } from "./metrology-error";
import { assessSteadiness } from "./settling-steady";
import { joinSample } from "./settling-trace";
import { waitingSentence } from "./settling-words";

/** One display value at its time since the output was switched on. */
export interface SettlingSample {
  seconds: number;
  /** Null when the display is over its range. */
  ohms: number | null;
}

/** What the detector remembers between samples. Plain JSON of bounded size. */
export interface SettlingWatch {
  policy: SettlingPolicy;
  /** R·C of the point plus the tester's filter. */
  timeConstantSeconds: number;
  ranges: DisplayRange[];
  samples: SettlingSample[];
  /** Time of the latest change of the display, and the longest time between two changes so far. */
  lastStepSeconds: number;
  longestStepSeconds: number;
}

/** How near a point is to settled. */
export interface SettlingAssessment {
  state: "watching" | "settled" | "unsettled";
  /** 0 to 1, for the bar. */
  progress: number;
  /**
   * Movement that the exponential fit expects of the coming minute, in per cent of the value; null while there are too
   * few values. A straight slope would exaggerate it: an exponential slows down.
   */
  driftPercentPerMinute: number | null;
  /** Start of the watching window, in seconds since the output was switched on. */
  windowFromSeconds: number;
  /** What is still missing, as a sentence; or how it settled. */
  sentence: string;
  /** Value the trace is heading for, by an exponential fit; null when the fit says nothing. */
  expectedOhms: number | null;
  /** Standard uncertainty of `expectedOhms`. */
  expectedUncertaintyOhms: number | null;
  /** Time constant of that fit. */
  fittedSeconds: number | null;
  /** Seconds until the point is expected to settle; null when nothing can be said. */
  secondsToGo: number | null;
}

/**
 * A watch that has seen nothing yet.
 *
 * Shape: policy, time constant in seconds (planning information: it shapes patience, never a verdict), display ranges.
 * Throws MetrologyError for a time constant that is negative or not finite.
 */
export function startWatch(
  policy: SettlingPolicy,
  timeConstantSeconds: number,
  ranges: readonly DisplayRange[],
): SettlingWatch {
  requireNonNegative("timeConstantSeconds", timeConstantSeconds);
  return {
    policy,
    timeConstantSeconds,
    ranges: [...ranges],
    samples: [],
    lastStepSeconds: 0,
    longestStepSeconds: 0,
  };
}

/**
 * The watch with one more display value. The watch given is left as it is.
 *
 * Shape: a display value in ohms (null over range) at its time since the output was switched on. Samples come in order
 * of time; one that is not later than the last one takes its place.
 * Throws MetrologyError for a time or a value that is negative or not finite.
 */
export function observe(watch: SettlingWatch, sample: SettlingSample): SettlingWatch {
  requireNonNegative("seconds", sample.seconds);
  if (sample.ohms !== null) requireNonNegative("ohms", sample.ohms);
  const previous = watch.samples.at(-1);
  const samples = joinSample(watch.samples, sample);
  if (previous && previous.ohms === sample.ohms) return { ...watch, samples };
  const sinceStep = previous && watch.lastStepSeconds > 0 ? sample.seconds - watch.lastStepSeconds : 0;
  return {
    ...watch,
    samples,
    lastStepSeconds: sample.seconds,
    longestStepSeconds: Math.max(watch.longestStepSeconds, sinceStep),
  };
}

/** How near the watched point is to settled, by the policy of its recipe. Deterministic: the same watch, the same answer. */
export function assess(watch: SettlingWatch): SettlingAssessment {
  return watch.policy.kind === "steady" ? assessSteadiness(watch, watch.policy) : assessWait(watch, watch.policy);
}

/**
 * Seconds that a fixed or scaled policy waits: `waitSeconds`, or `baseSeconds` + m·tau.
 * Throws MetrologyError for a time constant that is negative or not finite.
 */
export function waitSecondsOf(
  policy: Exclude<SettlingPolicy, { kind: "steady" }>,
  timeConstantSeconds: number,
): number {
  requireNonNegative("timeConstantSeconds", timeConstantSeconds);
  return policy.kind === "fixed" ? policy.waitSeconds : policy.baseSeconds + policy.timeConstants * timeConstantSeconds;
}

function assessWait(watch: SettlingWatch, policy: Exclude<SettlingPolicy, { kind: "steady" }>): SettlingAssessment {
  const waitSeconds = waitSecondsOf(policy, watch.timeConstantSeconds);
  const last = watch.samples.at(-1);
  const elapsed = last?.seconds ?? 0;
  const isOver = last !== undefined && elapsed >= waitSeconds;
  return {
    state: isOver ? "settled" : "watching",
    progress: isOver ? 1 : Math.min(0.99, waitSeconds === 0 ? 0 : elapsed / waitSeconds),
    driftPercentPerMinute: null,
    windowFromSeconds: 0,
    sentence: waitingSentence(waitSeconds, elapsed, isOver),
    expectedOhms: null,
    expectedUncertaintyOhms: null,
    fittedSeconds: null,
    secondsToGo: Math.max(0, waitSeconds - elapsed),
  };
}
