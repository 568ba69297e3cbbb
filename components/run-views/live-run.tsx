"use client";

import { JournalList } from "@/components/journal/journal-list";
import { StairLine } from "@/components/marks/stair-line";
import { NowPanel } from "@/components/now/now-panel";
import { RunHead } from "@/components/run/run-head";
import { StaleBanner } from "@/components/shell/stale-banner";
import { Panel } from "@/components/ui/panel";
import { useBench } from "@/lib/client/use-bench";
import { useCommand } from "@/lib/client/use-command";
import { useNow } from "@/lib/client/use-now";
import { useRun } from "@/lib/client/use-run";
import type { RunState } from "@/lib/journal/run-state";
import { isOver, stairGroups, unitTitle } from "@/lib/journal/selectors";
import { stateSentence } from "@/lib/journal/state-sentence";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import Link from "next/link";
import { announcement } from "./announcement";
import { MatrixPanel } from "./matrix-panel";
import { OutputLine } from "./output-line";
import { OutsideSoFar } from "./outside-so-far";
import { PageFrame } from "./page-frame";
import { PhoneHead } from "./phone-head";
import { PhoneNow } from "./phone-now";
import { RunCommands } from "./run-commands";
import { liveCrumbs, runPath } from "./run-links";
import { RunNotices } from "./run-notices";
import { RunPages } from "./run-pages";
import type { RunRights } from "./run-rights";
import { runTimes } from "./run-times";
import { TracePanel } from "./trace-panel";
import { keyWords, useRunKeys } from "./use-run-keys";

export interface LiveRunProps {
  runId: string;
  initial: RunState;
  bench: BenchSnapshot | null;
  rights: RunRights;
  nowMs: number;
}

/** One run while it happens. */
export function LiveRun({ runId, initial, bench, rights, nowMs }: LiveRunProps) {
  const { state, contact } = useRun(runId, initial);
  const benchNow = useBench(initial.setup?.bench.id ?? "", bench);
  const now = useNow(nowMs);
  const commands = useCommand(runId);
  const allowed = useRunKeys(state, rights, commands);
  const stale = contact.staleSinceMs !== null || contact.refusal !== null;
  const over = isOver(state.status);
  const times = over ? null : runTimes(state, now);
  return (
    <>
      <OutputLine output={state.output} benchName={state.setup?.bench.name ?? "the bench"} />
      <PageFrame className={allowed.length > 0 ? "max-sm:pb-24" : undefined}>
        <p className="sr-only" aria-live="polite">
          {announcement(state)}
        </p>
        <StaleBanner sinceMs={contact.staleSinceMs} refusal={contact.refusal} />
        <PhoneHead state={state} times={times} />
        <div className="max-sm:hidden">
          <RunHead
            crumbs={liveCrumbs(state)}
            title={unitTitle(state)}
            sentence={stateSentence(state)}
            times={times}
            commands={
              over ? (
                <RunPages runId={runId} here={null} />
              ) : (
                <div className="grid justify-items-end gap-1">
                  <div className="flex gap-2">
                    <RunCommands state={state} rights={rights} commands={commands} />
                  </div>
                  <p className="text-label text-ink-2">{keyWords(allowed)}</p>
                </div>
              )
            }
          />
        </div>
        <RunNotices
          runId={runId}
          state={state}
          room={benchNow?.room ?? null}
          canResume={rights.resume}
          failure={commands.failure}
        />
        <StairLine groups={stairGroups(state)} size="large" className="my-1" />
        <div className="grid items-start gap-3 lg:grid-cols-[minmax(0,1.16fr)_minmax(0,1fr)] lg:gap-4">
          <div className="grid gap-3 lg:order-last">
            <div className="max-sm:hidden">
              <NowPanel state={state} stale={stale} />
            </div>
            <div className="grid gap-3 sm:hidden">
              <PhoneNow state={state} stale={stale} />
              <OutsideSoFar state={state} />
            </div>
            <TracePanel state={state} stale={stale} />
          </div>
          <div className="grid gap-3">
            <MatrixPanel state={state} stale={stale} />
            <Panel
              title="Journal"
              right={
                <Link href={runPath(runId, "journal")} className="text-water underline underline-offset-3">
                  All {state.lastSeq} records
                </Link>
              }
              padding="flush"
            >
              <JournalList lines={state.lines} limit={14} />
            </Panel>
          </div>
        </div>
      </PageFrame>
      {allowed.length > 0 && (
        <div className="fixed inset-x-0 bottom-0 z-20 flex gap-2 border-t border-line bg-ground px-4 pt-2 pb-[max(0.5rem,env(safe-area-inset-bottom))] sm:hidden">
          <RunCommands state={state} rights={rights} commands={commands} size="touch" canSkip={false} isWide />
        </div>
      )}
    </>
  );
}
