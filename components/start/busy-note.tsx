"use client";

import { useQuery } from "@tanstack/react-query";
import { Button } from "@/components/ui/button";
import { Note } from "@/components/ui/note";
import { api } from "@/lib/client/api";
import { unitTitle } from "@/lib/journal/selectors";
import { stateSentence } from "@/lib/journal/state-sentence";

/** By what the bench is busy, and the way there. */
export function BusyNote({ benchName, runId }: { benchName: string; runId: string }) {
  const run = useQuery({
    queryKey: ["run-state", runId],
    queryFn: ({ signal }) => api.runState(runId, signal),
    refetchInterval: 5000,
  });
  const sentence = run.data && stateSentence(run.data);
  return (
    <Note
      tone="look"
      title={`${benchName} is busy.`}
      action={
        <Button size="small" href={`/runs/${runId}`}>
          Go to that run
        </Button>
      }
    >
      {run.data && sentence && `${unitTitle(run.data)}: ${sentence.lead} ${sentence.rest}`}
    </Note>
  );
}
