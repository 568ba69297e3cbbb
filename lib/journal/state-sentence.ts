import { formatOhms, formatTestVolts } from "@/lib/units/format";
import { pointName } from "./describe-event";
import type { PointPhase, RunState } from "./run-state";
import { nextPoint, verdictCounts } from "./selectors";

export interface StateSentence {
  /** The word in colour: `Settling`. */
  lead: string;
  /** What follows it: `10.00 GΩ at 500 V, point 48 of 63`. */
  rest: string;
  tone: "water" | "ochre" | "brick" | "plum" | "moss" | "plain";
}

const PHASE_WORDS: Readonly<Record<PointPhase, string>> = {
  discharging: "Discharging",
  setting: "Setting",
  energising: "Switching on",
  settling: "Settling",
  averaging: "Averaging",
  "de-energising": "Switching off",
};

/** What the run does at this moment, as a sentence. */
export function stateSentence(state: RunState): StateSentence {
  switch (state.status) {
    case "empty":
      return { lead: "Waiting", rest: "for the first record", tone: "plain" };
    case "running":
      return runningSentence(state);
    case "held":
      return { lead: "Held", rest: heldRest(state), tone: "ochre" };
    case "faulted":
      return { lead: "Held by a fault", rest: state.trouble?.message ?? "", tone: "brick" };
    case "interrupted":
      return {
        lead: "Interrupted",
        rest: `${state.interruption?.reason ?? ""} ${resumeRest(state)}`.trim(),
        tone: "brick",
      };
    case "stopped":
      return { lead: "Stopped", rest: `after ${judgedOf(state)} points`, tone: "ochre" };
    case "finished":
      return finishedSentence(state);
  }
}

function runningSentence(state: RunState): StateSentence {
  const active = state.active;
  if (!active) return { lead: "Running", rest: `${judgedOf(state)} points judged`, tone: "water" };
  const name = pointName(state.setup, active.point);
  const attempt = active.attempt > 1 ? `, attempt ${active.attempt}` : "";
  return {
    lead: PHASE_WORDS[active.phase],
    rest: `${name}, point ${active.point + 1} of ${state.points.length}${attempt}`,
    tone: "water",
  };
}

function heldRest(state: RunState): string {
  const who = state.hold ? `by ${state.hold.by.name}` : "";
  const why = state.hold?.reason ? `: ${state.hold.reason}` : "";
  return `${who}${why}, ${judgedOf(state)} points judged`;
}

function resumeRest(state: RunState): string {
  const next = nextPoint(state);
  const point = next === null ? undefined : state.setup?.plan.points[next];
  return point ? `It resumes at ${formatOhms(point.nominalOhms)}, ${formatTestVolts(point.testVolts)}.` : "";
}

function finishedSentence(state: RunState): StateSentence {
  const counts = verdictCounts(state);
  if (counts.outside > 0)
    return { lead: `${counts.outside} of ${counts.total} points outside`, rest: remainder(state), tone: "brick" };
  if (counts.unsettled > 0)
    return { lead: `${counts.unsettled} of ${counts.total} points unsettled`, rest: remainder(state), tone: "plum" };
  if (counts.doubtful > 0)
    return { lead: `${counts.doubtful} of ${counts.total} points doubtful`, rest: remainder(state), tone: "ochre" };
  return { lead: `All ${counts.inside} points inside`, rest: "", tone: "moss" };
}

function remainder(state: RunState): string {
  const counts = verdictCounts(state);
  return [
    counts.doubtful && counts.outside ? `${counts.doubtful} doubtful` : "",
    `${counts.inside} inside`,
    counts.unsettled && counts.outside ? `${counts.unsettled} unsettled` : "",
    counts.skipped ? `${counts.skipped} skipped` : "",
    counts.notStated ? `${counts.notStated} without a stated limit` : "",
  ]
    .filter(Boolean)
    .join(", ");
}

function judgedOf(state: RunState): string {
  return `${state.points.filter((point) => point.outcome === "judged").length} of ${state.points.length}`;
}
