import { POINT_OVERHEAD_SECONDS } from "@/lib/planning/forecast";
import type { PlannedPoint } from "@/lib/schemas/plan";
import type { RunCommand, RunStatus, StairGroup, StairStep, VerdictCounts } from "@/lib/schemas/run";
import { endedStatuses } from "@/lib/schemas/run";
import type { RunState } from "./run-state";

/** Index of the first point that is neither judged nor skipped; null when none is left. */
export function nextPoint(state: RunState): number | null {
  const index = state.points.findIndex((point) => point.outcome === "open");
  return index < 0 ? null : index;
}

export function isOver(status: RunState["status"]): boolean {
  return endedStatuses.includes(status as RunStatus);
}

/** The planned point of the attempt under way. */
export function presentPoint(state: RunState): PlannedPoint | null {
  return state.active ? (state.setup?.plan.points[state.active.point] ?? null) : null;
}

/** The unit as people call it: `Pellham IR-10, TW-0412`. */
export function unitTitle(state: RunState): string {
  const unit = state.setup?.unit;
  return unit ? `${unit.model.maker} ${unit.model.model}, ${unit.assetNumber}` : "Run";
}

/** Commands that mean something in this state; who may give them is for the table of permissions. */
export function allowedCommands(state: RunState): RunCommand["kind"][] {
  switch (state.status) {
    case "running":
      return ["hold", "skip", "stop"];
    case "held":
      return ["resume", "skip", "stop"];
    case "faulted":
    case "interrupted":
      return ["resume", "stop"];
    default:
      return [];
  }
}

export function verdictCounts(state: RunState): VerdictCounts {
  const counts = { inside: 0, doubtful: 0, outside: 0, unsettled: 0, notStated: 0, skipped: 0, open: 0 };
  for (const point of state.points) {
    if (point.outcome === "judged" && point.judgement) {
      const { verdict } = point.judgement;
      counts[verdict === "not-stated" ? "notStated" : verdict] += 1;
    } else counts[point.outcome === "skipped" ? "skipped" : "open"] += 1;
  }
  return { ...counts, total: state.points.length };
}

/** The stair line: points in the order of the run, a new group wherever the test voltage changes. */
export function stairGroups(state: RunState): StairGroup[] {
  const groups: StairGroup[] = [];
  for (const planned of state.setup?.plan.points ?? []) {
    const last = groups.at(-1);
    const step = stairStep(state, planned.index);
    if (last?.testVolts === planned.testVolts) last.steps.push(step);
    else groups.push({ testVolts: planned.testVolts, steps: [step] });
  }
  return groups;
}

function stairStep(state: RunState, index: number): StairStep {
  const point = state.points[index];
  if (point?.outcome === "judged" && point.judgement) return point.judgement.verdict;
  if (point?.outcome === "skipped") return "skipped";
  return state.active?.point === index ? "present" : "open";
}

/**
 * Bench seconds left, and how far that may be off: the forecast of each open point, corrected by how
 * the points judged so far compared with theirs. Null before the start and after the end.
 */
export function timeLeft(state: RunState): { seconds: number; spreadSeconds: number } | null {
  const planned = state.setup?.plan.points;
  if (!planned || isOver(state.status) || state.status === "empty") return null;
  const judged = planned.filter((point) => state.points[point.index]?.judgement);
  const expected = sum(judged.map((point) => point.forecastSeconds));
  const spent = judged.length > 0 ? runningSeconds(state) : 0;
  // Two points' worth of trust in the forecast keeps the first points from swinging it.
  const trust = 2 * (sum(planned.map((point) => point.forecastSeconds)) / Math.max(1, planned.length));
  const ratio = (spent + trust) / (expected + trust || 1);
  const open = planned.filter((point) => state.points[point.index]?.outcome === "open");
  const seconds = Math.max(0, sum(open.map((point) => point.forecastSeconds)) * ratio - presentSeconds(state));
  return { seconds, spreadSeconds: 0.15 * seconds + 2 * Math.sqrt(open.length) };
}

/** Bench seconds that the judged points took, by their own settling times and readings. */
function runningSeconds(state: RunState): number {
  const planned = state.setup?.plan.points ?? [];
  const update = state.setup?.unit.model.displayUpdateSeconds ?? 1;
  return sum(
    planned.map((point) => {
      const judgement = state.points[point.index]?.judgement;
      return judgement ? judgement.settlingSeconds + point.readings * update + POINT_OVERHEAD_SECONDS : 0;
    }),
  );
}

function presentSeconds(state: RunState): number {
  return state.active && state.active.onSinceMs !== null ? (state.elapsedMs - state.active.onSinceMs) / 1000 : 0;
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
