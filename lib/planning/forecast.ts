import { waitSecondsOf } from "@/lib/metrology/settling";
import type { UnitModel } from "@/lib/schemas/instrument";
import type { Plan } from "@/lib/schemas/plan";
import type { SettlingPolicy, UntilSteady } from "@/lib/schemas/settling";

/** Discharge, dials, voltage and switching of one point. */
export const POINT_OVERHEAD_SECONDS = 2;

/** The detector takes a point when what is left to move is this fraction of the value. */
const STEADY_FRACTION = 0.005;

export interface PointPace {
  settling: SettlingPolicy;
  timeConstantSeconds: number;
  readings: number;
  displayUpdateSeconds: UnitModel["displayUpdateSeconds"];
}

/**
 * Seconds that settling is expected to take, rounded up to the display update that ends it.
 *
 * Until steady: the first-order model is within a fraction eps of its end after tau·ln(1/eps), and the detector needs
 * its window on top of that; never less than the least nor more than the greatest wait.
 * Shape: policy, tau in seconds, update interval in seconds -> seconds.
 */
export function forecastSettlingSeconds(
  policy: SettlingPolicy,
  timeConstantSeconds: number,
  displayUpdateSeconds: number,
): number {
  const seconds =
    policy.kind === "steady"
      ? steadySeconds(policy, timeConstantSeconds, displayUpdateSeconds)
      : waitSecondsOf(policy, timeConstantSeconds);
  return Math.max(1, Math.ceil(seconds / displayUpdateSeconds - 1e-9)) * displayUpdateSeconds;
}

function steadySeconds(policy: UntilSteady, timeConstantSeconds: number, displayUpdateSeconds: number): number {
  const windowSeconds = policy.displayUpdates * displayUpdateSeconds;
  const approachSeconds = timeConstantSeconds * Math.log(1 / STEADY_FRACTION);
  return Math.min(
    policy.mostSeconds,
    Math.max(policy.leastSeconds, windowSeconds, approachSeconds + windowSeconds / 2),
  );
}

/** Seconds that one point is expected to take: settling, its readings, and what every point costs. */
export function forecastPointSeconds(pace: PointPace): number {
  const { settling, timeConstantSeconds, readings, displayUpdateSeconds } = pace;
  const settlingSeconds = forecastSettlingSeconds(settling, timeConstantSeconds, displayUpdateSeconds);
  return settlingSeconds + readings * displayUpdateSeconds + POINT_OVERHEAD_SECONDS;
}

/** Seconds that a plan is expected to take from its first point to its last. */
export function forecastRunSeconds(plan: Plan): number {
  return plan.points.reduce((sum, point) => sum + point.forecastSeconds, 0);
}
