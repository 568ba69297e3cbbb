export type EngineErrorCode =
  | "bench-busy"
  | "bench-unknown"
  | "not-ready"
  | "run-unknown"
  | "not-active"
  | "not-allowed-now"
  | "register"
  | "storage";

/** A request that the engine refuses, in words for the person who made it. Recognised by name and code across the bundle seam. */
export class EngineError extends Error {
  override readonly name = "EngineError";
  constructor(
    readonly code: EngineErrorCode,
    message: string,
    options?: { cause?: unknown },
  ) {
    super(message, options);
  }
}

export function isEngineError(error: unknown): error is EngineError {
  return error instanceof Error && error.name === "EngineError" && "code" in error;
}
