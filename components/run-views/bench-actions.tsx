"use client";

import { Button } from "@/components/ui/button";
import { useCommand } from "@/lib/client/use-command";
import type { RunState } from "@/lib/journal/run-state";
import { RunCommands } from "./run-commands";
import { runPath } from "./run-links";
import type { RunRights } from "./run-rights";

/** Watch, Hold or Resume, and Stop of the run on a bench. */
export function BenchActions({ runId, state, rights }: { runId: string; state: RunState | null; rights: RunRights }) {
  const commands = useCommand(runId);
  return (
    <>
      <Button size="small" href={runPath(runId)}>
        Watch
      </Button>
      {state && <RunCommands state={state} rights={rights} commands={commands} size="small" canSkip={false} />}
      {commands.failure && (
        <p role="alert" className="w-full text-small text-brick">
          {commands.failure}
        </p>
      )}
    </>
  );
}
