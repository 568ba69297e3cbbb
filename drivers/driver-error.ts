export type DriverErrorCode =
  | "port-lost"
  | "no-answer"
  | "garbled-reply"
  | "wrong-read-back"
  | "not-discharged"
  | "device-error"
  | "refused"
  | "wrong-identity";

/**
 * Trouble with one device. `message` says what happened, to which device, with numbers; `cure` says what a person can do.
 * Recognised by name and code, because the web bundle holds a second copy of this class.
 */
export class DriverError extends Error {
  override readonly name = "DriverError";
  constructor(
    readonly code: DriverErrorCode,
    readonly device: string,
    message: string,
    readonly cure: string,
    options?: { cause?: unknown },
  ) {
    super(message, options);
  }
}

export function isDriverError(error: unknown): error is DriverError {
  return error instanceof Error && error.name === "DriverError" && "code" in error;
}

/** Codes after which the same question may be asked again without harm. */
export function isWorthRepeating(error: unknown): boolean {
  return isDriverError(error) && (error.code === "no-answer" || error.code === "garbled-reply");
}
