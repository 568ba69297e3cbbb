/** What a fit of an exponential to a running trace says. Resistances are relative to the latest display value. */
export interface ExponentialOutlook {
  /** End value and its standard uncertainty. */
  end: number;
  endUncertainty: number;
  timeConstantSeconds: number;
  /** Probability that the present value lies within the tolerance of the end. */
  arrivedProbability: number;
  /** Movement expected within the coming minute. */
  minuteMovement: number;
}

/** One time constant with what the trace says under it. */
export interface TimeConstantOutlook {
  timeConstantSeconds: number;
  /** Natural logarithm of the evidence for it, up to a constant. */
  logWeight: number;
  end: number;
  endVariance: number;
  arrivedProbability: number;
  minuteMovement: number;
}

/** Range of time constants that are looked at. */
export const LEAST_SECONDS = 0.05;
export const MOST_SECONDS = 400;

/** How far the planned time constant is trusted: a factor of e to this power, as one standard deviation. */
const PLANNED_SPREAD = 1;

/** Logarithm of the belief in a time constant before the trace is looked at; flat where none was planned. */
export function plannedLogBelief(timeConstantSeconds: number, plannedSeconds: number): number {
  if (plannedSeconds <= 0) return 0;
  return -0.5 * (Math.log(timeConstantSeconds / plannedSeconds) / PLANNED_SPREAD) ** 2;
}

/** `count` values from `from` to `to`, evenly spaced in their logarithm. */
export function logSpaced(from: number, to: number, count: number): number[] {
  const ratio = Math.log(to / from) / (count - 1);
  return Array.from({ length: count }, (_, index) => from * Math.exp(ratio * index));
}

/** Joins what several time constants say, each by its evidence. Null when none has any. */
export function joinOutlooks(outlooks: readonly TimeConstantOutlook[]): ExponentialOutlook | null {
  const highest = Math.max(...outlooks.map(({ logWeight }) => logWeight));
  if (!Number.isFinite(highest)) return null;
  const weights = outlooks.map(({ logWeight }) => Math.exp(logWeight - highest));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const average = (pick: (outlook: TimeConstantOutlook) => number) =>
    outlooks.reduce((sum, outlook, index) => sum + weights[index]! * pick(outlook), 0) / total;
  const end = average((outlook) => outlook.end);
  return {
    end,
    endUncertainty: Math.sqrt(average((outlook) => outlook.endVariance + (outlook.end - end) ** 2)),
    timeConstantSeconds: Math.exp(average((outlook) => Math.log(outlook.timeConstantSeconds))),
    arrivedProbability: average((outlook) => outlook.arrivedProbability),
    minuteMovement: average((outlook) => outlook.minuteMovement),
  };
}

/**
 * Cumulative normal distribution, light enough for every sample of every screen.
 * Source: Abramowitz and Stegun, 26.2.17, absolute error under 7.5e-8 (from memory).
 */
export function normalProbability(z: number): number {
  const t = 1 / (1 + 0.2316419 * Math.abs(z));
  const series = t * (0.31938153 + t * (-0.356563782 + t * (1.781477937 + t * (-1.821255978 + t * 1.330274429))));
  const tail = (Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI)) * series;
  return z >= 0 ? 1 - tail : tail;
}
