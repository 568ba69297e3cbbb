export type DataErrorCode =
  "database-in-use" | "database-too-old" | "database-damaged" | "release-frozen" | "bench-taken" | "unknown-record";

/** Trouble with stored data, in words. Recognised by name and code. */
export class DataError extends Error {
  override readonly name = "DataError";
  constructor(
    readonly code: DataErrorCode,
    message: string,
    options?: { cause?: unknown },
  ) {
    super(message, options);
  }
}
