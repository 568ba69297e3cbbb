import { preflightRequestSchema } from "@/lib/schemas/run";
import { handler, readJson } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const POST = handler("run.start", async ({ request }) =>
  Response.json(await getServices().benches.preflight(preflightRequestSchema.parse(await readJson(request)))),
);
