import { handler } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const GET = handler("register.read", async ({ request }) => {
  const search = new URL(request.url).searchParams.get("search") ?? "";
  const units = await getServices().repositories.units.list(search);
  return Response.json(units.map(({ simulation: _simulation, ...unit }) => unit));
});
