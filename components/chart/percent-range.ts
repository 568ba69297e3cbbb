export interface PercentPoint {
  errorPercent: number | null;
  limitPercent: number | null;
  uncertaintyPercent?: number | null;
}

/** Errors up to this many of the largest limits set the axis; what lies farther stands at its edge with its figure. */
const FARTHEST_LIMITS = 3;
const LEAST_REACH_PERCENT = 5;

/** How far the axis of errors reaches from zero, in per cent. */
export function percentReach(points: readonly PercentPoint[]): number {
  return Math.max(LEAST_REACH_PERCENT, FARTHEST_LIMITS * largestLimit(points));
}

/** The axis of errors: all limits, and all errors within the reach, with room for what stands at the edge. */
export function percentRange(points: readonly PercentPoint[]): [number, number] {
  const limit = largestLimit(points);
  const reach = percentReach(points);
  const values = points.flatMap(({ errorPercent, uncertaintyPercent }) => {
    const half = uncertaintyPercent ?? 0;
    return errorPercent === null ? [] : [errorPercent - half, errorPercent + half].map((end) => held(end, reach));
  });
  const low = Math.min(-limit, -0.1, ...values);
  const high = Math.max(limit, 0.1, ...values);
  const pad = 0.1 * (high - low);
  return [low - pad, high + pad];
}

/** A value kept within the reach. */
export function held(percent: number, reach: number): number {
  return Math.min(reach, Math.max(-reach, percent));
}

function largestLimit(points: readonly PercentPoint[]): number {
  return points.reduce((largest, { limitPercent }) => Math.max(largest, limitPercent ?? 0), 0);
}
