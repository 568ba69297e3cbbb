import { firstRunSchema } from "@/lib/schemas/person";
import { AppError } from "@/lib/server/app-error";
import { openHandler, readJson } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const POST = openHandler(async ({ request }) => {
  const { site } = getServices();
  if (!(await site.isEmpty())) throw new AppError("conflict", "This site is set up already. Sign in.");
  const { cookie } = await site.setUp(firstRunSchema.parse(await readJson(request)));
  return new Response(null, { status: 204, headers: { "Set-Cookie": cookie } });
});
