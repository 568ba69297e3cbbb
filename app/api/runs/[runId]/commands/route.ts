import { can, type Action } from "@/lib/auth/permissions";
import { runCommandSchema, type RunCommand } from "@/lib/schemas/run";
import { AppError } from "@/lib/server/app-error";
import { handler, readJson } from "@/lib/server/handler";
import { getServices } from "@/lib/server/services";

const actionOf: Readonly<Record<RunCommand["kind"], Action>> = {
  hold: "run.hold",
  resume: "run.resume",
  skip: "run.skip",
  stop: "run.stop",
};

export const POST = handler<{ runId: string }>("run.watch", async ({ request, params, person }) => {
  const command = runCommandSchema.parse(await readJson(request));
  if (!can(person, actionOf[command.kind]))
    throw new AppError("forbidden", `Your role does not allow you to ${command.kind} a run.`);
  await getServices().benches.command(params.runId, command, { id: person.id, name: person.name });
  return new Response(null, { status: 202 });
});
