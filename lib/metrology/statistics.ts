import { MetrologyError, requireFinite } from "./metrology-error";

/** A straight line through points by least squares. */
export interface FittedLine {
  slope: number;
  intercept: number;
  /** Standard uncertainty of the slope from the scatter about the line; 0 with two points. */
  slopeUncertainty: number;
}

/**
 * Arithmetic mean.
 *
 * Shape: one or more finite values -> one value in the same unit.
 * Throws MetrologyError for an empty list or a value that is not finite.
 * Source: JCGM 100:2008, 4.2.1. The second pass removes the rounding of the first.
 */
export function mean(values: readonly number[], field = "values"): number {
  requireValues(values, 1, field);
  const first = sumOf(values) / values.length;
  return first + sumOf(values.map((value) => value - first)) / values.length;
}

/**
 * Experimental standard deviation of one value (divisor n - 1).
 *
 * Shape: two or more finite values -> one value in the same unit, zero or more.
 * Throws MetrologyError with fewer than two values or one that is not finite.
 * Source: JCGM 100:2008, 4.2.2; corrected two-pass form, sound when mean and spread differ by many decades.
 */
export function sampleDeviation(values: readonly number[], field = "values"): number {
  requireValues(values, 2, field);
  const centre = mean(values, field);
  const deviations = values.map((value) => value - centre);
  const rounding = sumOf(deviations) ** 2 / values.length;
  return Math.sqrt(Math.max(0, sumOf(deviations.map((deviation) => deviation ** 2)) - rounding) / (values.length - 1));
}

/**
 * Experimental standard deviation of the mean, s/√n: the Type A standard uncertainty of a mean of readings.
 *
 * Shape and errors as `sampleDeviation`. Source: JCGM 100:2008, 4.2.3.
 */
export function deviationOfMean(values: readonly number[], field = "values"): number {
  return sampleDeviation(values, field) / Math.sqrt(values.length);
}

/**
 * Straight line y = intercept + slope · x by least squares, with the standard uncertainty of its slope.
 *
 * Shape: two lists of equal length, two or more finite values, at least two different x.
 * Throws MetrologyError otherwise.
 * Source: JCGM 100:2008, H.3.2.
 */
export function fitLine(x: readonly number[], y: readonly number[]): FittedLine {
  requireValues(x, 2, "x");
  requireValues(y, 2, "y");
  if (x.length !== y.length) throw new MetrologyError("y", `has ${y.length} values for ${x.length} of x`);
  const centreX = mean(x);
  const centreY = mean(y);
  const spread = sumOf(x.map((value) => (value - centreX) ** 2));
  if (spread === 0) throw new MetrologyError("x", "must hold at least two different values");
  const slope = sumOf(x.map((value, index) => (value - centreX) * (y[index]! - centreY))) / spread;
  const residuals = x.map((value, index) => y[index]! - centreY - slope * (value - centreX));
  const freedom = x.length - 2;
  const variance = freedom > 0 ? sumOf(residuals.map((residual) => residual ** 2)) / freedom : 0;
  return { slope, intercept: centreY - slope * centreX, slopeUncertainty: Math.sqrt(variance / spread) };
}

function sumOf(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0);
}

function requireValues(values: readonly number[], least: number, field: string): void {
  if (values.length < least) {
    throw new MetrologyError(field, `must hold at least ${least === 1 ? "one value" : `${least} values`}`);
  }
  values.forEach((value, index) => requireFinite(`${field}[${index}]`, value));
}
