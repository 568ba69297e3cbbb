import type { RunEvent, RunEventOf } from "@/lib/schemas/run-event";
import { applyActivePoint } from "./apply-active-point";
import { describeEvent } from "./describe-event";
import { JournalGapError } from "./journal-gap-error";
import { KEPT_LINES, type JournalLine, type PointState, type RunState } from "./run-state";

/**
 * Folds one journal record into the state of its run. Pure: the only times it knows are the record's.
 *
 * Records at or before `lastSeq` change nothing. Throws JournalGapError when a record is missing.
 */
export function applyRunEvent(state: RunState, event: RunEvent): RunState {
  if (event.seq <= state.lastSeq) return state;
  if (event.seq > state.lastSeq + 1) throw new JournalGapError(state.lastSeq, event.seq);
  const stamped = { ...state, lastSeq: event.seq, atMs: event.atMs, elapsedMs: event.elapsedMs };
  const next = applyStatus({ ...stamped, active: applyActivePoint(state, event) }, event);
  return event.type === "reading.taken" ? next : { ...next, lines: withLine(next, event) };
}

/** What an event means for the run as a whole, the attempt under way left aside. */
function applyStatus(state: RunState, event: RunEvent): RunState {
  switch (event.type) {
    case "run.started":
      return begin(state, event);
    case "point.started":
      return { ...state, points: patchPoint(state, event.data.point, { attempts: event.data.attempt }) };
    case "point.judged":
      return {
        ...state,
        points: patchPoint(state, event.data.point, {
          outcome: "judged",
          judgement: event.data.judgement,
          judgedElapsedMs: event.elapsedMs,
        }),
      };
    case "point.skipped":
      return { ...state, points: patchPoint(state, event.data.point, { outcome: "skipped" }) };
    case "dials.set":
      return { ...state, dials: event.data.positions };
    case "output.off-proven":
      return { ...state, output: { state: "off", volts: event.data.terminalVolts } };
    case "output.switching-on":
      return { ...state, output: { state: "on", volts: event.data.testVolts } };
    case "output.switched-on":
      return { ...state, output: { state: "on", volts: event.data.terminalVolts } };
    case "reading.taken":
      return event.data.volts === null ? state : { ...state, output: { state: "on", volts: event.data.volts } };
    case "output.unproven":
      return { ...state, output: { state: "unknown", volts: null } };
    case "run.held":
      return { ...state, status: "held", hold: { ...event.data, atMs: event.atMs } };
    case "run.resumed":
      return { ...state, status: "running", hold: null, trouble: null, interruption: null };
    case "run.faulted":
      return { ...state, status: "faulted", trouble: event.data };
    case "run.interrupted":
      return {
        ...state,
        status: "interrupted",
        hold: null,
        interruption: { reason: event.data.reason, atMs: event.atMs },
      };
    case "run.stopped":
      return { ...state, status: "stopped", hold: null, endedAtMs: event.atMs };
    case "run.finished":
      return { ...state, status: "finished", hold: null, endedAtMs: event.atMs };
    case "voltage.selected":
    case "point.settled":
    case "point.unsettled":
    case "point.abandoned":
    case "device.recovered":
      return state;
  }
}

function begin(state: RunState, event: RunEventOf<"run.started">): RunState {
  const open: PointState = { attempts: 0, outcome: "open", judgement: null, judgedElapsedMs: null };
  return {
    ...state,
    status: "running",
    setup: event.data,
    startedAtMs: event.atMs,
    points: event.data.plan.points.map(() => open),
  };
}

function patchPoint(state: RunState, index: number, patch: Partial<PointState>): PointState[] {
  return state.points.map((point, at) => (at === index ? { ...point, ...patch } : point));
}

function withLine(state: RunState, event: RunEvent): JournalLine[] {
  const { text, tone } = describeEvent(event, state.setup);
  const line = { seq: event.seq, atMs: event.atMs, elapsedMs: event.elapsedMs, text, tone };
  return [...state.lines.slice(-(KEPT_LINES - 1)), line];
}
