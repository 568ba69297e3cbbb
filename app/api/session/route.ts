import { signInSchema } from "@/lib/schemas/person";
import { AppError } from "@/lib/server/app-error";
import { openHandler, readJson } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const POST = openHandler(async ({ request }) => {
  const form = signInSchema.parse(await readJson(request));
  const outcome = await getServices().auth.signIn(form, request.headers.get("x-stepwell-address") ?? "unknown");
  if (outcome.kind === "refused") throw new AppError("unauthenticated", outcome.message);
  if (outcome.kind === "slowed") {
    throw new AppError("too-many", outcome.message, { retryAfterSeconds: outcome.retryAfterSeconds });
  }
  return new Response(null, { status: 204, headers: { "Set-Cookie": outcome.cookie } });
});

export const DELETE = openHandler(async ({ request }) => {
  const cookie = await getServices().auth.signOut(request.headers.get("cookie") ?? "");
  return new Response(null, { status: 204, headers: { "Set-Cookie": cookie } });
});
