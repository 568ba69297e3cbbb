import {
  joinOutlooks,
  LEAST_SECONDS,
  logSpaced,
  MOST_SECONDS,
  plannedLogBelief,
  type ExponentialOutlook,
  type TimeConstantOutlook,
} from "./exponential";
import type { Plateau } from "./settling-trace";

/** Plateaus of a coarse display, made ready for fitting. */
export interface SteppedTrace {
  plateaus: readonly Plateau[];
  /** When the trace began, and its latest time. */
  fromSeconds: number;
  nowSeconds: number;
  /** The latest display value: resistances are fitted relative to it. */
  shownOhms: number;
  /** Display step and tolerance for having arrived, relative to the latest value. */
  step: number;
  tolerance: number;
  plannedSeconds: number;
}

/** A point (end value, amplitude at the beginning). */
type Corner = readonly [end: number, amplitude: number];

/** Keeps the corners with a·end + b·amplitude <= c. */
interface HalfPlane {
  a: number;
  b: number;
  c: number;
}

const GRID = 20;
const MOST_PLATEAUS = 12;
/** How far a plateau's bounds are widened, in display steps: wide while tau is searched for, then ever less. */
const SLACKS = [0.75, 0.3, 0.1, 0.03];

/**
 * What a display that moves in coarse steps says about an exponential: every end value and amplitude that passes
 * through all the plateaus counts the same, for each time constant of a grid that narrows as the bounds are tightened.
 *
 * For a fixed tau the plateaus bound a polygon in (end, amplitude), whose area is the evidence for that tau and whose
 * share within the tolerance is the probability of having arrived. Null when no exponential passes through.
 */
export function fitStepped(trace: SteppedTrace): ExponentialOutlook | null {
  let taus = logSpaced(LEAST_SECONDS, MOST_SECONDS, GRID);
  let found: ExponentialOutlook | null = null;
  for (const slack of SLACKS) {
    const outlooks = taus.map((tau) => outlookAt(trace, tau, slack * trace.step));
    const joined = joinOutlooks(outlooks);
    if (!joined) break;
    found = joined;
    taus = narrowed(outlooks);
  }
  return found;
}

function outlookAt(trace: SteppedTrace, tau: number, slack: number): TimeConstantOutlook {
  const polygon = clipAll(possibleBegin(), planesOf(trace, tau, slack));
  const area = areaOf(polygon);
  if (area <= 0) return impossible(tau);
  const [end, amplitude] = centroidOf(polygon, area);
  const arrived = clipAll(polygon, [
    { a: 1, b: 0, c: 1 + trace.tolerance + slack },
    { a: -1, b: 0, c: trace.tolerance + slack - 1 },
  ]);
  const residual = -amplitude * Math.exp(-(trace.nowSeconds - trace.fromSeconds) / tau);
  const ends = polygon.map((corner) => corner[0]);
  return {
    timeConstantSeconds: tau,
    logWeight: Math.log(area) + plannedLogBelief(tau, trace.plannedSeconds),
    end,
    endVariance: (Math.max(...ends) - Math.min(...ends)) ** 2 / 18,
    arrivedProbability: areaOf(arrived) / area,
    minuteMovement: residual * (1 - Math.exp(-60 / tau)),
  };
}

function impossible(tau: number): TimeConstantOutlook {
  return {
    timeConstantSeconds: tau,
    logWeight: -Infinity,
    end: 1,
    endVariance: 0,
    arrivedProbability: 0,
    minuteMovement: 0,
  };
}

/** Where a trace may begin: between nothing and twice its end, which lies within a factor of eight of what is shown. */
function possibleBegin(): Corner[] {
  return [
    [0.125, -0.125],
    [8, -8],
    [8, 8],
    [0.125, 0.125],
  ];
}

function planesOf(trace: SteppedTrace, tau: number, slack: number): HalfPlane[] {
  return trace.plateaus.slice(-MOST_PLATEAUS).flatMap(({ fromSeconds, toSeconds, leastOhms, mostOhms }) => {
    const least = leastOhms / trace.shownOhms - slack;
    const most = mostOhms / trace.shownOhms + slack;
    const times = fromSeconds === toSeconds ? [fromSeconds] : [fromSeconds, toSeconds];
    return times.flatMap((seconds) => {
      const decay = Math.exp(-(seconds - trace.fromSeconds) / tau);
      return [
        { a: 1, b: decay, c: most },
        { a: -1, b: -decay, c: -least },
      ];
    });
  });
}

function clipAll(polygon: readonly Corner[], planes: readonly HalfPlane[]): readonly Corner[] {
  let left = polygon;
  for (const plane of planes) {
    if (left.length === 0) break;
    left = clip(left, plane);
  }
  return left;
}

/** The part of a convex polygon within a half-plane (Sutherland and Hodgman). */
function clip(polygon: readonly Corner[], { a, b, c }: HalfPlane): readonly Corner[] {
  const beyond = polygon.map(([end, amplitude]) => a * end + b * amplitude - c);
  if (beyond.every((value) => value <= 0)) return polygon;
  const kept: Corner[] = [];
  polygon.forEach((corner, index) => {
    const following = (index + 1) % polygon.length;
    const next = polygon[following]!;
    const [here, there] = [beyond[index]!, beyond[following]!];
    if (here <= 0) kept.push(corner);
    if (here <= 0 !== there <= 0) {
      const share = here / (here - there);
      kept.push([corner[0] + share * (next[0] - corner[0]), corner[1] + share * (next[1] - corner[1])]);
    }
  });
  return kept;
}

function areaOf(polygon: readonly Corner[]): number {
  return Math.abs(sumOverEdges(polygon, (cross) => cross)) / 2;
}

function centroidOf(polygon: readonly Corner[], area: number): Corner {
  if (area < 1e-18) return polygon[0]!;
  const signed = sumOverEdges(polygon, (cross) => cross) / 2;
  return [
    sumOverEdges(polygon, (cross, p, q) => (p[0] + q[0]) * cross) / (6 * signed),
    sumOverEdges(polygon, (cross, p, q) => (p[1] + q[1]) * cross) / (6 * signed),
  ];
}

/** Sums over the edges, corners taken relative to the first one so that thin polygons keep their area. */
function sumOverEdges(polygon: readonly Corner[], term: (cross: number, p: Corner, q: Corner) => number): number {
  let sum = 0;
  for (let index = 0; index < polygon.length; index += 1) {
    const p = polygon[index]!;
    const q = polygon[(index + 1) % polygon.length]!;
    sum += term(p[0] * q[1] - q[0] * p[1], p, q);
  }
  return sum;
}

/** A finer grid over the time constants that are still possible, one neighbour on each side included. */
function narrowed(outlooks: readonly TimeConstantOutlook[]): number[] {
  const possible = outlooks.map(({ logWeight }) => Number.isFinite(logWeight));
  const first = Math.max(0, possible.indexOf(true) - 1);
  const last = Math.min(outlooks.length - 1, possible.lastIndexOf(true) + 1);
  return logSpaced(outlooks[first]!.timeConstantSeconds, outlooks[last]!.timeConstantSeconds, GRID);
}
