import { z } from "zod";

const problemSchema = z.object({ path: z.array(z.union([z.string(), z.number()])), message: z.string() });
/** One fault of a form: where it stands and what would be right. */
export type Problem = z.infer<typeof problemSchema>;

const refusalSchema = z.object({
  code: z.string().default("refused"),
  message: z.string(),
  problems: z.array(problemSchema).default([]),
  retryAfterSeconds: z.number().optional(),
});

interface Refusal {
  /** HTTP status; 0 when no answer came. */
  status: number;
  code: string;
  problems?: Problem[];
  retryAfterSeconds?: number;
}

/** The server refused, or did not answer. `message` is for people. */
export class ApiError extends Error {
  override readonly name = "ApiError";
  readonly status: number;
  readonly code: string;
  readonly problems: Problem[];
  readonly retryAfterSeconds: number | null;

  constructor(message: string, refusal: Refusal, options?: { cause?: unknown }) {
    super(message, options);
    this.status = refusal.status;
    this.code = refusal.code;
    this.problems = refusal.problems ?? [];
    this.retryAfterSeconds = refusal.retryAfterSeconds ?? null;
  }

  /** The request may not have arrived, so the same may be sent again. */
  get isUnanswered(): boolean {
    return this.status === 0 || this.status >= 502;
  }
}

export function isApiError(error: unknown): error is ApiError {
  return error instanceof Error && error.name === "ApiError";
}

/** What to tell a person about any failure. */
export function failureMessage(error: unknown): string {
  return isApiError(error) ? error.message : "Something went wrong in this page. Load it again.";
}

/** The error that an answer with a status of 400 or more stands for. */
export async function errorFrom(response: Response): Promise<ApiError> {
  const body = refusalSchema.safeParse(await response.json().catch(() => null));
  if (body.success) return new ApiError(body.data.message, { status: response.status, ...body.data });
  return new ApiError(plainMessage(response.status), { status: response.status, code: "unexplained" });
}

export function noAnswer(cause: unknown): ApiError {
  const message = "The server did not answer. Check the network; nothing is known to have changed.";
  return new ApiError(message, { status: 0, code: "no-answer" }, { cause });
}

function plainMessage(status: number): string {
  if (status === 401) return "You are signed out. Sign in again.";
  if (status === 403) return "Your roles do not allow this.";
  if (status === 404) return "This does not exist, or no longer.";
  return `The server answered with status ${status} and no reason.`;
}
