import { AppError } from "@/lib/server/app-error";
import { handler } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const GET = handler<{ runId: string }>("run.watch", async ({ params }) => {
  const columns = await getServices().repositories.journal.columns(params.runId);
  if (columns.events.length === 0) throw new AppError("not-found", "There is no such run.");
  return Response.json(columns);
});
