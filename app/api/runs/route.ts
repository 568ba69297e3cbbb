import { runQuerySchema, startRunSchema } from "@/lib/schemas/run";
import { handler, readJson } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const GET = handler("run.watch", async ({ request }) => {
  const query = runQuerySchema.parse(Object.fromEntries(new URL(request.url).searchParams));
  return Response.json(await getServices().repositories.runs.query(query));
});

export const POST = handler("run.start", async ({ request, person }) => {
  const order = startRunSchema.parse(await readJson(request));
  return Response.json(await getServices().benches.start(order, { id: person.id, name: person.name }), { status: 201 });
});
