import { clipPolygon, measurePolygon, type Polygon } from "./convex-polygon";
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
  scaleOhms: number;
  /** Display step and tolerance for having arrived, relative to the latest value. */
  step: number;
  tolerance: number;
  plannedSeconds: number;
}

/** Where the trace was at one time: between `least` and `most`, relative to the latest value. */
interface Gate {
  seconds: number;
  least: number;
  most: number;
}

const GRID = 16;
const MOST_PLATEAUS = 12;
/** How far a gate is widened, in display steps: wide while tau is searched for, then less; noise needs the last of it. */
const SLACKS = [0.75, 0.3, 0.1];
/** Gates wider than this say nothing worth knowing. */
const MOST_SLACK = 0.3;
/** (end, amplitude) of any trace: it begins between nothing and twice its end, which lies within a factor of eight of what is shown. */
const POSSIBLE: Polygon = [
  [0.125, -0.125],
  [8, -8],
  [8, 8],
  [0.125, 0.125],
];

/**
 * What a display that moves in coarse steps says about an exponential end + amplitude · exp(-t/tau): every end and
 * amplitude that passes through all the plateaus counts the same, for each tau of a grid that narrows as the bounds
 * are tightened.
 *
 * For a fixed tau the plateaus bound a polygon in (end, amplitude); its area is the evidence for that tau, and the share
 * of it within the tolerance is the probability of having arrived. Null when no exponential passes through.
 */
export function fitStepped(trace: SteppedTrace): ExponentialOutlook | null {
  const gates = gatesOf(trace);
  let taus = logSpaced(LEAST_SECONDS, MOST_SECONDS, GRID);
  let found: ExponentialOutlook | null = null;
  for (const slack of SLACKS) {
    const outlooks = taus.map((tau) => outlookAt(trace, gates, tau, slack * trace.step));
    const joined = joinOutlooks(outlooks);
    if (!joined) break;
    if (slack <= MOST_SLACK) found = joined;
    taus = narrowed(outlooks);
  }
  return found;
}

/** The newest plateaus at their beginnings and ends: an exponential that passes there passes between. */
function gatesOf({ plateaus, fromSeconds, scaleOhms }: SteppedTrace): Gate[] {
  return plateaus.slice(-MOST_PLATEAUS).flatMap((plateau) => {
    const bounds = { least: plateau.leastOhms / scaleOhms, most: plateau.mostOhms / scaleOhms };
    const first = { seconds: plateau.fromSeconds - fromSeconds, ...bounds };
    if (plateau.toSeconds === plateau.fromSeconds) return [first];
    return [first, { seconds: plateau.toSeconds - fromSeconds, ...bounds }];
  });
}

function outlookAt(trace: SteppedTrace, gates: readonly Gate[], tau: number, slack: number): TimeConstantOutlook {
  const polygon = passing(gates, tau, slack);
  const { area, centre } = measurePolygon(polygon);
  const [end, amplitude] = centre;
  const ends = polygon.map((corner) => corner[0]);
  const residual = -amplitude * Math.exp(-(trace.nowSeconds - trace.fromSeconds) / tau);
  return {
    timeConstantSeconds: tau,
    logWeight: Math.log(area) + plannedLogBelief(tau, trace.plannedSeconds),
    end,
    // Standard deviation of a triangular distribution over the same width (JCGM 100:2008, 4.3.9).
    endVariance: area > 0 ? (Math.max(...ends) - Math.min(...ends)) ** 2 / 24 : 0,
    arrivedProbability: area > 0 ? arrivedArea(polygon, trace.tolerance + slack) / area : 0,
    minuteMovement: residual * (1 - Math.exp(-60 / tau)),
  };
}

/** All (end, amplitude) whose exponential passes through the gates. */
function passing(gates: readonly Gate[], tau: number, slack: number): Polygon {
  let polygon = POSSIBLE;
  for (let index = gates.length - 1; index >= 0 && polygon.length > 0; index -= 1) {
    const { seconds, least, most } = gates[index]!;
    const decay = Math.exp(-seconds / tau);
    polygon = clipPolygon(polygon, 1, decay, most + slack);
    polygon = clipPolygon(polygon, -1, -decay, slack - least);
  }
  return polygon;
}

function arrivedArea(polygon: Polygon, tolerance: number): number {
  const below = clipPolygon(polygon, 1, 0, 1 + tolerance);
  return measurePolygon(clipPolygon(below, -1, 0, tolerance - 1)).area;
}

/** A finer grid over the time constants that are still possible, one neighbour on each side included. */
function narrowed(outlooks: readonly TimeConstantOutlook[]): number[] {
  const isPossible = ({ logWeight }: TimeConstantOutlook) => Number.isFinite(logWeight);
  const first = Math.max(0, outlooks.findIndex(isPossible) - 1);
  const last = Math.min(outlooks.length - 1, outlooks.findLastIndex(isPossible) + 1);
  return logSpaced(outlooks[first]!.timeConstantSeconds, outlooks[last]!.timeConstantSeconds, GRID);
}
