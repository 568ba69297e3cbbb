import { z } from "zod";
import { handler } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

const querySchema = z.object({ point: z.coerce.number().int().nonnegative().optional() });

export const GET = handler<{ runId: string }>("run.watch", async ({ request, params }) => {
  const { point } = querySchema.parse(Object.fromEntries(new URL(request.url).searchParams));
  return Response.json(await getServices().repositories.journal.readings(params.runId, { point }));
});
