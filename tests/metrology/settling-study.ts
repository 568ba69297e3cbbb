import { assess, observe, startWatch } from "@/lib/metrology/settling";
import type { DisplayRange } from "@/lib/schemas/instrument";
import type { UntilSteady } from "@/lib/schemas/settling";
import { ohms } from "@/lib/units/quantities";
import { seededRandom } from "../support/seeded-random";

/** A made-up settling display: first order towards its end, noisy, read in steps. Values relative to 1 GΩ. */
export interface GeneratedTrace {
  endOhms: number;
  timeConstantSeconds: number;
  /** A second lag, as a filter behind the terminals has, as a share of the first. */
  secondLag: number;
  /** What the planner would have believed. */
  plannedSeconds: number;
  startFraction: number;
  noise: number;
  stepOhms: number;
  updateSeconds: number;
}

export interface StudyOptions {
  traces: number;
  seed: number;
  policy: UntilSteady;
  readings: number;
  /** Share of the time constant that a second lag has; 0 for a plain exponential. */
  secondLag: number;
}

export interface StudyTrial {
  trace: GeneratedTrace;
  outcome: "settled" | "unsettled";
  seconds: number;
  oracleSeconds: number;
  meanOhms: number;
  toleranceOhms: number;
  isWithin: boolean;
}

export interface StudyResult {
  trials: StudyTrial[];
  /** Share of the taken points that lie within their tolerance. */
  shareWithin: number;
  unsettled: number;
  /** Seconds of settling over the oracle's, summed over all points. */
  timeRatio: number;
  /** The same with the averaged readings counted on both sides. */
  pointTimeRatio: number;
  /** Over the shortest fixed wait that reaches the same share within. */
  timeOfFixedWait: number;
}

export const studyPolicy: UntilSteady = {
  kind: "steady",
  driftPercentPerMinute: 0.5,
  spreadPercent: 1,
  displayUpdates: 3,
  leastSeconds: 0,
  mostSeconds: 600,
};

/** Runs the detector over traces from one seed and compares it with an oracle that knows each end. */
export function studySettling(options: StudyOptions): StudyResult {
  const random = seededRandom(options.seed);
  const traces = Array.from({ length: options.traces }, () => generateTrace(random, options.secondLag));
  const trials = traces.map((trace) => runTrial(trace, Math.floor(random() * 2 ** 31), options));
  const taken = trials.filter(({ outcome }) => outcome === "settled");
  const seconds = total(trials.map((trial) => trial.seconds));
  const oracle = total(trials.map((trial) => trial.oracleSeconds));
  const averaging = total(traces.map(({ updateSeconds }) => options.readings * updateSeconds));
  const shareWithin = taken.filter(({ isWithin }) => isWithin).length / taken.length;
  return {
    trials,
    shareWithin,
    unsettled: trials.length - taken.length,
    timeRatio: seconds / oracle,
    pointTimeRatio: (seconds + averaging) / (oracle + averaging),
    timeOfFixedWait: seconds / trials.length / fixedWaitSeconds(trials, shareWithin),
  };
}

function generateTrace(random: () => number, secondLag: number): GeneratedTrace {
  const between = (from: number, to: number) => from + random() * (to - from);
  const spread = (from: number, to: number) => Math.exp(between(Math.log(from), Math.log(to)));
  const timeConstantSeconds = spread(0.2, 30);
  const endOhms = 1e9 * between(1, 10);
  return {
    endOhms,
    timeConstantSeconds,
    secondLag,
    plannedSeconds: timeConstantSeconds * spread(0.5, 2),
    startFraction: random() < 0.5 ? 0 : between(0.5, 0.9),
    noise: spread(1e-4, 2e-3),
    stepOhms: endOhms * spread(1e-4, 0.1),
    updateSeconds: spread(0.3, 5),
  };
}

function runTrial(trace: GeneratedTrace, seed: number, { policy, readings }: StudyOptions): StudyTrial {
  const display = displayOf(trace, seed);
  const { outcome, seconds } = watchDisplay(trace, display, policy);
  const toleranceOhms = toleranceOf(trace, readings);
  const meanFrom = (from: number) =>
    total(Array.from({ length: readings }, (_, index) => display(from + (index + 1) * trace.updateSeconds))) / readings;
  const meanOhms = meanFrom(seconds);
  return {
    trace,
    outcome,
    seconds,
    oracleSeconds: oracleSecondsOf(trace, toleranceOhms, meanFrom),
    meanOhms,
    toleranceOhms,
    isWithin: Math.abs(meanOhms - trace.endOhms) <= toleranceOhms,
  };
}

function watchDisplay(trace: GeneratedTrace, display: (seconds: number) => number, policy: UntilSteady) {
  const ranges: DisplayRange[] = [{ toOhms: ohms(2 * trace.endOhms), resolutionOhms: ohms(trace.stepOhms) }];
  let watch = startWatch(policy, trace.plannedSeconds, ranges);
  for (let update = 1; ; update += 1) {
    const seconds = update * trace.updateSeconds;
    watch = observe(watch, { seconds, ohms: display(seconds) });
    const { state } = assess(watch);
    if (state !== "watching") return { outcome: state, seconds };
  }
}

/** The display at each update; the noise of an update is the same whenever it is asked for. */
function displayOf(trace: GeneratedTrace, seed: number): (seconds: number) => number {
  return (seconds) => {
    const update = Math.round(seconds / trace.updateSeconds);
    const approach = 1 - (1 - trace.startFraction) * remainder(seconds, trace);
    const noisy = trace.endOhms * (approach + trace.noise * normalNumber(seededRandom(seed + update)));
    return Math.max(0, Math.round(noisy / trace.stepOhms) * trace.stepOhms);
  };
}

/** What is left of a step after one or two lags in a row, as a fraction of it. */
function remainder(seconds: number, { timeConstantSeconds, secondLag }: GeneratedTrace): number {
  const first = Math.exp(-seconds / timeConstantSeconds);
  if (secondLag === 0) return first;
  return (first - secondLag * Math.exp(-seconds / (secondLag * timeConstantSeconds))) / (1 - secondLag);
}

/** One number of a standard normal distribution (Box and Muller). */
function normalNumber(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** The larger of 0.5 % of the value, half a display step, and the noise of the mean. */
function toleranceOf(trace: GeneratedTrace, readings: number): number {
  const noiseOfMean = (trace.noise * trace.endOhms) / Math.sqrt(readings);
  return Math.max(0.005 * trace.endOhms, trace.stepOhms / 2, noiseOfMean);
}

/** The first display update after which the mean of the readings is within the tolerance. */
function oracleSecondsOf(trace: GeneratedTrace, toleranceOhms: number, meanFrom: (seconds: number) => number): number {
  const most = Math.ceil((20 * trace.timeConstantSeconds) / trace.updateSeconds) + 3;
  for (let update = 1; update < most; update += 1) {
    const seconds = update * trace.updateSeconds;
    if (Math.abs(meanFrom(seconds) - trace.endOhms) <= toleranceOhms) return seconds;
  }
  return most * trace.updateSeconds;
}

/** The wait that, given to every point alike, brings `share` of them to their oracle's time. */
function fixedWaitSeconds(trials: readonly StudyTrial[], share: number): number {
  const oracle = trials.map(({ oracleSeconds }) => oracleSeconds).sort((a, b) => a - b);
  return oracle[Math.min(oracle.length - 1, Math.ceil(share * oracle.length) - 1)]!;
}

function total(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0);
}
