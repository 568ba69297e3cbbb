/** An error that a route handler turns into its status, in words for the person. Recognised by name across the bundle seam. */
export class AppError extends Error {
  override readonly name = "AppError";
  constructor(
    readonly code:
      | "unauthenticated"
      | "forbidden"
      | "not-found"
      | "conflict"
      | "invalid"
      | "too-many"
      | "foreign-origin"
      | "unsupported",
    message: string,
    readonly extra: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}

export const statusByCode: Readonly<Record<AppError["code"], number>> = {
  unauthenticated: 401,
  forbidden: 403,
  "not-found": 404,
  conflict: 409,
  invalid: 422,
  "too-many": 429,
  "foreign-origin": 403,
  unsupported: 415,
};

export function isAppError(error: unknown): error is AppError {
  return error instanceof Error && error.name === "AppError" && "code" in error;
}
