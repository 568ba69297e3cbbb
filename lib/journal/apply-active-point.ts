import { assess, observe, startWatch } from "@/lib/metrology/settling";
import type { RunEvent, RunEventOf } from "@/lib/schemas/run-event";
import type { ActivePoint, PointPhase, RunState, TraceSample } from "./run-state";

/** Samples that a trace holds before it is thinned to half. */
const LONGEST_TRACE = 1200;

/** The attempt under way after `event`; null between attempts. */
export function applyActivePoint(state: RunState, event: RunEvent): ActivePoint | null {
  if (event.type === "point.started") return beginAttempt(event);
  const active = state.active;
  if (!active) return null;
  switch (event.type) {
    case "dials.set":
      return inPhase(active, "setting");
    case "output.switching-on":
      return inPhase(active, "energising");
    case "output.switched-on":
      return beginSettling(state, active, event);
    case "reading.taken":
      return takeReading(active, event);
    case "point.settled":
    case "point.unsettled":
      return inPhase(active, "averaging");
    case "point.judged":
    case "point.skipped":
    case "point.abandoned":
    case "run.faulted":
    case "run.interrupted":
    case "run.stopped":
    case "run.finished":
      return null;
    default:
      return active;
  }
}

function beginAttempt(event: RunEventOf<"point.started">): ActivePoint {
  return {
    point: event.data.point,
    attempt: event.data.attempt,
    phase: "discharging",
    onSinceMs: null,
    indicationOhms: null,
    overRange: false,
    terminalVolts: null,
    terminalAmperes: null,
    trace: [],
    traceStride: 1,
    samples: 0,
    watch: null,
    assessment: null,
    averaged: 0,
  };
}

function inPhase(active: ActivePoint, phase: PointPhase): ActivePoint {
  return { ...active, phase };
}

function beginSettling(state: RunState, active: ActivePoint, event: RunEventOf<"output.switched-on">): ActivePoint {
  const planned = state.setup?.plan.points[active.point];
  const ranges = state.setup?.unit.model.ranges ?? [];
  return {
    ...active,
    phase: "settling",
    onSinceMs: event.elapsedMs,
    terminalVolts: event.data.terminalVolts,
    watch: planned ? startWatch(planned.settling, planned.timeConstantSeconds, ranges) : null,
  };
}

function takeReading(active: ActivePoint, event: RunEventOf<"reading.taken">): ActivePoint {
  const seconds = (event.elapsedMs - (active.onSinceMs ?? event.elapsedMs)) / 1000;
  const { phase, ohms, volts, amperes } = event.data;
  const watch = active.watch && phase === "settling" ? observe(active.watch, { seconds, ohms }) : active.watch;
  return {
    ...active,
    ...extendTrace(active, { seconds, ohms, phase }),
    indicationOhms: ohms,
    overRange: ohms === null,
    terminalVolts: volts ?? active.terminalVolts,
    terminalAmperes: amperes ?? active.terminalAmperes,
    watch,
    assessment: watch && phase === "settling" ? assess(watch) : active.assessment,
    averaged: active.averaged + (phase === "averaging" ? 1 : 0),
  };
}

/** Adds a sample, keeping every `traceStride`-th; averaged readings are always kept. */
function extendTrace(active: ActivePoint, sample: TraceSample): Pick<ActivePoint, "trace" | "traceStride" | "samples"> {
  const samples = active.samples + 1;
  if (sample.phase === "settling" && active.samples % active.traceStride !== 0) {
    return { trace: active.trace, traceStride: active.traceStride, samples };
  }
  const trace = [...active.trace, sample];
  if (trace.length < LONGEST_TRACE) return { trace, traceStride: active.traceStride, samples };
  return { trace: trace.filter((_, index) => index % 2 === 0), traceStride: active.traceStride * 2, samples };
}
