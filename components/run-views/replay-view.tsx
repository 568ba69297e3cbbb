"use client";

import type { ReactNode } from "react";
import { JournalList } from "@/components/journal/journal-list";
import { NowPanel } from "@/components/now/now-panel";
import { RunHead } from "@/components/run/run-head";
import type { Crumb } from "@/components/ui/breadcrumb";
import { Panel } from "@/components/ui/panel";
import { spanAt } from "@/lib/client/replay-stops";
import { useReplay, type Replay } from "@/lib/client/use-replay";
import { useShortcuts } from "@/lib/client/use-shortcuts";
import type { RunState } from "@/lib/journal/run-state";
import { stairGroups } from "@/lib/journal/selectors";
import type { JournalColumns } from "@/lib/schemas/journal-columns";
import { MatrixPanel } from "./matrix-panel";
import { PageFrame } from "./page-frame";
import { ReplayBar } from "./replay-bar";
import { replaySentence, timeOfDay } from "./replay-words";
import { TracePanel } from "./trace-panel";

export interface ReplayViewProps {
  columns: JournalColumns;
  atSeq: number;
  title: string;
  crumbs: readonly Crumb[];
  /** Ways to the other pages of this run. */
  pages: ReactNode;
}

/** The run as it was at any moment, told by the same reducer and drawn by the same parts as when it happened. */
export function ReplayView({ columns, atSeq, title, crumbs, pages }: ReplayViewProps) {
  const replay = useReplay(columns, atSeq);
  const { timeline, spans, view } = replay;
  useReplayKeys(replay);
  const state = timeline.stateAt(view.seq);
  const sentence = replaySentence(state);
  const atThatPoint = withItsTrace(state, replay);
  const ended = endOf(atThatPoint, timeline.end);
  return (
    <PageFrame>
      <RunHead crumbs={crumbs} title={title} sentence={sentence} commands={pages} />
      <ReplayBar
        view={view}
        spans={spans}
        groups={stairGroups(timeline.end)}
        lastElapsedMs={timeline.lastElapsedMs}
        moment={sentence.rest}
      />
      <div className="grid items-start gap-3 lg:grid-cols-[minmax(0,1.16fr)_minmax(0,1fr)] lg:gap-4">
        <div className="grid gap-3 lg:order-last">
          <NowPanel state={atThatPoint} title="Then" endedAt={ended} />
          <TracePanel state={atThatPoint} />
        </div>
        <div className="grid gap-3">
          <MatrixPanel
            state={state}
            note={`as it stood at ${timeOfDay(state.atMs)}`}
            selected={atThatPoint.active?.point ?? null}
            onSelect={(point) => seekPoint(replay, point)}
          />
          <Panel title="Journal" note={`up to ${timeOfDay(state.atMs)}`} padding="flush">
            <JournalList lines={state.lines} limit={10} />
          </Panel>
        </div>
      </div>
    </PageFrame>
  );
}

function useReplayKeys({ view }: Replay): void {
  useShortcuts({
    " ": view.togglePlay,
    ArrowLeft: view.pointBefore,
    ArrowRight: view.nextPoint,
    "Shift+ArrowLeft": () => view.step(-1),
    "Shift+ArrowRight": () => view.step(1),
    n: view.nextOutside,
  });
}

function seekPoint({ spans, view }: Replay, point: number): void {
  const span = spans.find((candidate) => candidate.point === point);
  if (span) view.seek(span.completeSeq);
}

/** Between two points nothing is being measured: the trace of the one just judged stays in view. */
function withItsTrace(state: RunState, { timeline, spans, view }: Replay): RunState {
  const span = spanAt(spans, view.seq);
  if (state.active || !span || view.seq <= span.completeSeq) return state;
  return { ...state, active: timeline.stateAt(span.completeSeq).active };
}

/** How the point in view ended, which its moment did not know. */
function endOf({ active }: RunState, end: RunState) {
  const judgement = active && end.points[active.point]?.judgement;
  return judgement ? { ohms: judgement.indicationOhms, settlingSeconds: judgement.settlingSeconds } : null;
}
