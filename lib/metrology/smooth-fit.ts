import {
  joinOutlooks,
  LEAST_SECONDS,
  logSpaced,
  MOST_SECONDS,
  normalProbability,
  plannedLogBelief,
  type ExponentialOutlook,
  type TimeConstantOutlook,
} from "./exponential";
import type { DisplayValue } from "./settling-trace";

/** A trace made ready for fitting: values relative to the latest one, times from the first one. */
export interface SmoothTrace {
  values: readonly DisplayValue[];
  /** What the values are relative to: the latest of them, or the display's step where that is larger. */
  scaleOhms: number;
  /** Display step, relative to the scale. */
  step: number;
  /** Tolerance for having arrived, relative to the scale. */
  tolerance: number;
  plannedSeconds: number;
}

export interface SmoothFit extends ExponentialOutlook {
  /** Scatter of the display values about the fit, relative to the latest value. */
  scatter: number;
}

/** Values joined into one, for speed. */
interface Bin {
  seconds: number;
  value: number;
  count: number;
}

/** One least-squares solution y = end + amplitude · exp(-t/tau), with its matrix inverse before scaling by the scatter. */
interface Solution {
  timeConstantSeconds: number;
  end: number;
  amplitude: number;
  /** Sum of weighted squares, the prior's included. */
  squares: number;
  inverse: { endEnd: number; amplitudeAmplitude: number };
  determinant: number;
  lastDecay: number;
}

const MOST_BINS = 64;
const GRID = 16;
const ROUNDS = 3;
/** Time constants whose evidence is lower by this much in its logarithm are left out of the next round. */
const NEGLIGIBLE = 8;
/** The readings that will be averaged carry noise of their own; so many of them are counted on. */
const READINGS_TO_COME = 4;
/** A scatter expected before there are enough values to tell, as a fraction of the value, and its weight in values. */
const USUAL_SCATTER = 0.0007;
const USUAL_WEIGHT = 2;
/** Amplitude at the first sample, as a fraction of the value: a trace begins somewhere between nothing and twice its end. */
const USUAL_AMPLITUDE = 1;

/**
 * Least-squares fit of end + amplitude · exp(-t/tau) to display values whose steps are small beside their noise.
 *
 * For a fixed tau the fit is linear; tau runs over a grid that narrows round the best one, and each value of it counts
 * by its evidence. Null with fewer than three values.
 * Source: JCGM 100:2008, H.3 for the linear part; the joint answer is the mean over tau by Bayes' rule.
 */
export function fitSmooth(trace: SmoothTrace): SmoothFit | null {
  if (trace.values.length < 3) return null;
  const bins = binned(trace);
  const usual = USUAL_SCATTER ** 2 + trace.step ** 2 / 12;
  let taus = logSpaced(LEAST_SECONDS, MOST_SECONDS, GRID);
  let variance = usual;
  let outlooks: TimeConstantOutlook[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    if (round > 0) taus = narrowed(outlooks);
    const solutions = taus.map((tau) => solve(bins, tau, variance));
    variance = scatterVariance(solutions, bins.length, usual);
    outlooks = solutions.map((solution) => outlookOf(solution, variance, trace));
  }
  const joined = joinOutlooks(outlooks);
  return joined && { ...joined, scatter: Math.sqrt(variance) };
}

function binned({ values, scaleOhms }: SmoothTrace): Bin[] {
  const from = values[0]!.seconds;
  const size = Math.ceil(values.length / MOST_BINS);
  return Array.from({ length: Math.ceil(values.length / size) }, (_, index) => {
    const group = values.slice(index * size, (index + 1) * size);
    const count = group.length;
    return {
      seconds: group.reduce((sum, { seconds }) => sum + seconds, 0) / count - from,
      value: group.reduce((sum, { ohms }) => sum + ohms, 0) / count / scaleOhms - 1,
      count,
    };
  });
}

function solve(bins: readonly Bin[], timeConstantSeconds: number, variance: number): Solution {
  let [n, su, suu, sy, suy, syy] = [0, 0, variance / USUAL_AMPLITUDE ** 2, 0, 0, 0];
  let decay = 1;
  for (const { seconds, value, count } of bins) {
    decay = Math.exp(-seconds / timeConstantSeconds);
    n += count;
    su += count * decay;
    suu += count * decay * decay;
    sy += count * value;
    suy += count * decay * value;
    syy += count * value * value;
  }
  const determinant = n * suu - su * su;
  const end = (suu * sy - su * suy) / determinant;
  const amplitude = (n * suy - su * sy) / determinant;
  return {
    timeConstantSeconds,
    end,
    amplitude,
    squares: Math.max(0, syy - end * sy - amplitude * suy),
    inverse: { endEnd: suu / determinant, amplitudeAmplitude: n / determinant },
    determinant,
    lastDecay: decay,
  };
}

function scatterVariance(solutions: readonly Solution[], count: number, usual: number): number {
  const least = Math.min(...solutions.map(({ squares }) => squares));
  return (USUAL_WEIGHT * usual + least) / (USUAL_WEIGHT + Math.max(0, count - 3));
}

function outlookOf(solution: Solution, variance: number, trace: SmoothTrace): TimeConstantOutlook {
  const { timeConstantSeconds, amplitude, lastDecay, inverse } = solution;
  const residual = -amplitude * lastDecay;
  const noise = Math.max(0, variance - trace.step ** 2 / 12);
  const deviation = Math.sqrt(variance * lastDecay ** 2 * inverse.amplitudeAmplitude + noise / READINGS_TO_COME);
  const { tolerance, plannedSeconds } = trace;
  return {
    timeConstantSeconds,
    logWeight:
      -solution.squares / (2 * variance) -
      0.5 * Math.log(solution.determinant) +
      plannedLogBelief(timeConstantSeconds, plannedSeconds),
    end: 1 + solution.end,
    endVariance: variance * inverse.endEnd,
    arrivedProbability: probabilityWithin(residual, deviation, tolerance),
    minuteMovement: residual * (1 - Math.exp(-60 / timeConstantSeconds)),
  };
}

function probabilityWithin(centre: number, deviation: number, tolerance: number): number {
  if (deviation < 1e-12) return Math.abs(centre) <= tolerance ? 1 : 0;
  return normalProbability((tolerance - centre) / deviation) - normalProbability((-tolerance - centre) / deviation);
}

/** A finer grid over the time constants that the trace supports, one neighbour on each side included. */
function narrowed(outlooks: readonly TimeConstantOutlook[]): number[] {
  const highest = Math.max(...outlooks.map(({ logWeight }) => logWeight));
  const isSupported = ({ logWeight }: TimeConstantOutlook) => logWeight > highest - NEGLIGIBLE;
  const first = Math.max(0, outlooks.findIndex(isSupported) - 1);
  const last = Math.min(outlooks.length - 1, outlooks.findLastIndex(isSupported) + 1);
  return logSpaced(outlooks[first]!.timeConstantSeconds, outlooks[last]!.timeConstantSeconds, GRID);
}
