"use client";

import { useState } from "react";
import { PointTrace } from "@/components/trace/point-trace";
import { pointTraceData } from "@/components/trace/point-trace-data";
import { RunTrace, type RunTracePoint } from "@/components/trace/run-trace";
import { classNames } from "@/components/ui/class-names";
import { Panel } from "@/components/ui/panel";
import { Segmented } from "@/components/ui/segmented";
import { pointName } from "@/lib/journal/describe-event";
import type { RunState } from "@/lib/journal/run-state";
import { isOver } from "@/lib/journal/selectors";

const VIEWS = [
  { value: "point", label: "Point" },
  { value: "run", label: "Run" },
] as const;

/** CSS pixels. */
const TRACE_HEIGHT = 320;

/** How this point came to its value, or how all points of the run came out in their order. */
export function TracePanel({ state, stale = false }: { state: RunState; stale?: boolean }) {
  const [chosen, setChosen] = useState<"point" | "run" | null>(null);
  const view = chosen ?? (isOver(state.status) && !state.active ? "run" : "point");
  return (
    <Panel
      title={view === "point" ? "Trace of this point" : "Errors in the order of the run"}
      right={<Segmented label="What is drawn" value={view} segments={VIEWS} onChange={setChosen} />}
      padding="flush"
    >
      <div className={classNames(stale && "opacity-60")}>
        {view === "point" ? <LatestTrace state={state} /> : <RunTrace points={runTracePoints(state)} />}
      </div>
    </Panel>
  );
}

/** Between two points the trace of the one just judged stays, so that nothing flickers. */
function LatestTrace({ state }: { state: RunState }) {
  const present = pointTraceData(state);
  const [latest, setLatest] = useState(present);
  if (present && present.samples !== latest?.samples) setLatest(present);
  const shown = present ?? (state.status === "running" ? latest : null);
  if (shown) return <PointTrace data={shown} height={TRACE_HEIGHT} />;
  return (
    <p className="px-3.5 py-3 text-ink-2" style={{ height: TRACE_HEIGHT + 8 }}>
      No point is being measured.
    </p>
  );
}

function runTracePoints(state: RunState): RunTracePoint[] {
  return state.points
    .flatMap(({ judgement, judgedElapsedMs }, index) =>
      judgement && judgedElapsedMs !== null
        ? [
            {
              name: pointName(state.setup, index),
              elapsedSeconds: judgedElapsedMs / 1000,
              errorPercent: judgement.errorPercent,
              limitPercent: judgement.limitPercent,
              verdict: judgement.verdict,
            },
          ]
        : [],
    )
    .sort((before, after) => before.elapsedSeconds - after.elapsedSeconds);
}
