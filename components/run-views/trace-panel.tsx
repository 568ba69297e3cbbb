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

const VIEWS = [
  { value: "point", label: "Point" },
  { value: "run", label: "Run" },
] as const;

const NO_TRACE = {
  samples: [],
  standardOhms: null,
  limitOhms: null,
  expectedOhms: null,
  fittedSeconds: null,
  windowFromSeconds: null,
};

/** How this point came to its value, or how all points of the run came out in their order. */
export function TracePanel({ state, stale = false }: { state: RunState; stale?: boolean }) {
  const [view, setView] = useState<"point" | "run">("point");
  return (
    <Panel
      title={view === "point" ? "Trace of this point" : "Errors in the order of the run"}
      right={<Segmented label="What is drawn" value={view} segments={VIEWS} onChange={setView} />}
      padding="flush"
    >
      <div className={classNames(stale && "opacity-60")}>
        {view === "point" ? (
          <PointTrace data={pointTraceData(state) ?? NO_TRACE} />
        ) : (
          <RunTrace points={runTracePoints(state)} />
        )}
      </div>
    </Panel>
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
