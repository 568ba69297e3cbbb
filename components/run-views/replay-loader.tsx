"use client";

import { useQuery } from "@tanstack/react-query";
import { RunHead } from "@/components/run/run-head";
import { Button } from "@/components/ui/button";
import type { Crumb } from "@/components/ui/breadcrumb";
import { Loading } from "@/components/ui/loading";
import { Note } from "@/components/ui/note";
import { api } from "@/lib/client/api";
import { failureMessage } from "@/lib/client/api-error";
import { PageFrame } from "./page-frame";
import { ReplayView } from "./replay-view";
import { RunPages } from "./run-pages";

export interface ReplayLoaderProps {
  runId: string;
  /** The moment of the link. */
  atSeq: number;
  title: string;
  crumbs: readonly Crumb[];
}

/** Fetches the journal once; the replay needs the server no more. */
export function ReplayLoader({ runId, atSeq, title, crumbs }: ReplayLoaderProps) {
  const journal = useQuery({
    queryKey: ["journal", runId],
    queryFn: ({ signal }) => api.runJournal(runId, signal),
    staleTime: 60_000,
    refetchOnWindowFocus: false,
  });
  const pages = <RunPages runId={runId} here="replay" />;
  if (journal.data) {
    return <ReplayView columns={journal.data} atSeq={atSeq} title={title} crumbs={crumbs} pages={pages} />;
  }
  return (
    <PageFrame>
      <RunHead
        crumbs={crumbs}
        title={title}
        sentence={{ lead: "Replay", rest: journal.isError ? "not loaded" : "is being loaded", tone: "plum" }}
        commands={pages}
      />
      {journal.isError ? (
        <Note
          tone="bad"
          alert
          title="The journal was not loaded."
          action={
            <Button size="small" onClick={() => void journal.refetch()}>
              Try again
            </Button>
          }
        >
          {failureMessage(journal.error)}
        </Note>
      ) : (
        <Loading what="the journal of this run" />
      )}
    </PageFrame>
  );
}
