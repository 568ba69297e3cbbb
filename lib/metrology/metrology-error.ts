/**
 * An input that no formula can use. `field` names it as the caller wrote it: `readings[2]`, `positions`, `rows[0].toOhms`.
 *
 * Recognise it by `name`: a second copy of this class exists in the web bundle.
 */
export class MetrologyError extends RangeError {
  override readonly name = "MetrologyError";

  constructor(
    readonly field: string,
    problem: string,
  ) {
    super(`${field} ${problem}`);
  }
}

/** Whether `error` tells of an unusable input, also when it comes from another bundle. */
export function isMetrologyError(error: unknown): error is MetrologyError {
  return error instanceof Error && error.name === "MetrologyError" && "field" in error;
}

/** Returns `value`. Throws MetrologyError when it is NaN or infinite. */
export function requireFinite(field: string, value: number): number {
  if (!Number.isFinite(value)) throw new MetrologyError(field, `must be a finite number, got ${value}`);
  return value;
}

/** Returns `value`. Throws MetrologyError unless it is finite and zero or more. */
export function requireNonNegative(field: string, value: number): number {
  if (requireFinite(field, value) < 0) throw new MetrologyError(field, `must be zero or more, got ${value}`);
  return value;
}

/** Returns `value`. Throws MetrologyError unless it is finite and more than zero. */
export function requirePositive(field: string, value: number): number {
  if (requireFinite(field, value) <= 0) throw new MetrologyError(field, `must be more than zero, got ${value}`);
  return value;
}
