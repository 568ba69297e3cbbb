import { ZodError } from "zod";
import { can, type Action } from "@/lib/auth/permissions";
import type { Person } from "@/lib/schemas/person";
import { AppError, isAppError, statusByCode } from "./app-error";
import { isAllowedHost, isOwnOrigin } from "./origin";
import { getServices } from "./services";

/** Bodies above this are refused unread. */
const LARGEST_BODY_BYTES = 1_000_000;

export interface HandlerInput<P> {
  request: Request;
  params: P;
  person: Person;
}

type RouteContext<P> = { params: Promise<P> };
type Route<P> = (request: Request, context: RouteContext<P>) => Promise<Response>;

/** A route handler for signed-in people who may do `action`. Guards first: host, origin, session, permission. */
export function handler<P = Record<string, never>>(
  action: Action,
  act: (input: HandlerInput<P>) => Promise<Response>,
): Route<P> {
  return guarded(async (request, params) => {
    const person = await getServices().auth.personOf(request.headers.get("cookie") ?? "");
    if (!person) throw new AppError("unauthenticated", "Sign in to go on.");
    if (!can(person, action)) throw new AppError("forbidden", "Your role does not allow this.");
    return act({ request, params, person });
  });
}

/** A route handler that needs no session: sign-in, sign-out, first run. */
export function openHandler<P = Record<string, never>>(
  act: (input: Omit<HandlerInput<P>, "person">) => Promise<Response>,
): Route<P> {
  return guarded((request, params) => act({ request, params }));
}

function guarded<P>(act: (request: Request, params: P) => Promise<Response>): Route<P> {
  return async (request, context) => {
    try {
      guardOrigin(request);
      const response = await act(request, await context.params);
      response.headers.set("Cache-Control", "no-store");
      return response;
    } catch (error) {
      return errorResponse(error);
    }
  };
}

function guardOrigin(request: Request): void {
  const { headers, method } = request;
  const host = headers.get("host");
  if (!isAllowedHost(host, getServices().allowedHosts))
    throw new AppError("foreign-origin", "This host name is not served.");
  if (method === "GET" || method === "HEAD") return;
  const isOwn = isOwnOrigin({ origin: headers.get("origin"), host, fetchSite: headers.get("sec-fetch-site") });
  if (!isOwn) throw new AppError("foreign-origin", "This request does not come from Stepwell's own pages.");
}

/** The request's JSON, unchecked. Throws AppError for another content type, a large body or broken JSON. */
export async function readJson(request: Request): Promise<unknown> {
  const type = request.headers.get("content-type") ?? "";
  if (!type.startsWith("application/json")) throw new AppError("unsupported", "Send JSON.");
  const text = await request.text();
  if (text.length > LARGEST_BODY_BYTES) throw new AppError("invalid", "The request is larger than 1 MB.");
  try {
    return JSON.parse(text);
  } catch {
    throw new AppError("invalid", "The request is not JSON.");
  }
}

/** Status of each refusal of the engine and of stored data. */
const refusalStatus: Readonly<Record<string, number>> = {
  "bench-taken": 409,
  "release-frozen": 409,
  "unknown-record": 404,
  "bench-busy": 409,
  "not-ready": 409,
  "not-active": 409,
  "not-allowed-now": 409,
  "bench-unknown": 404,
  "run-unknown": 404,
  register: 422,
  storage: 503,
};

function errorResponse(error: unknown): Response {
  if (isAppError(error)) {
    return Response.json(
      { code: error.code, message: error.message, ...error.extra },
      { status: statusByCode[error.code] },
    );
  }
  if (isNamed(error, "ZodError")) return invalidResponse(error as ZodError);
  if (isNamed(error, "EngineError") || isNamed(error, "DataError")) {
    const { code, message } = error as Error & { code: string };
    return Response.json({ code, message }, { status: refusalStatus[code] ?? 500 });
  }
  getServices().log.error("a request failed", error);
  return Response.json(
    { code: "internal", message: "Stepwell met a fault of its own; it is in the log. Try again." },
    { status: 500 },
  );
}

function invalidResponse(error: ZodError): Response {
  const problems = error.issues.map(({ path, message }) => ({ path, message }));
  const message = problems[0]?.message ?? "The request is not complete.";
  return Response.json({ code: "invalid", message, problems }, { status: 422 });
}

/** By name: errors cross the seam between the server and the web bundle. */
function isNamed(error: unknown, name: string): boolean {
  return (error instanceof Error && error.name === name) || (error instanceof ZodError && name === "ZodError");
}
