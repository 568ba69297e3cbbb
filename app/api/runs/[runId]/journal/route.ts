import type { JournalColumns } from "@/lib/schemas/journal-columns";
import { AppError } from "@/lib/server/app-error";
import { handler } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

export const GET = handler<{ runId: string }>("run.watch", async ({ params }) => {
  const { journal } = getServices().repositories;
  const events = await journal.events(params.runId);
  if (events.length === 0) throw new AppError("not-found", "There is no such run.");
  const columns: JournalColumns = { events, readings: await journal.readings(params.runId, {}) };
  return Response.json(columns);
});
