import type { ActivePoint, PointPhase, RunState } from "@/lib/journal/run-state";

const BEFORE_SETTLING: Readonly<Partial<Record<PointPhase, string>>> = {
  discharging: "Output off; waiting until the terminals are discharged",
  setting: "Setting the dials and the test voltage, each read back",
  energising: "Switching the output on",
  "de-energising": "Switching the output off",
};

/** What happens at the present point, in a sentence. */
export function nowSentence(state: RunState): string {
  const { active } = state;
  if (!active) return restingSentence(state);
  if (active.phase === "averaging") return averagingSentence(state, active);
  return BEFORE_SETTLING[active.phase] ?? active.assessment?.sentence ?? "Waiting for the first reading";
}

function restingSentence({ status, output }: RunState): string {
  if (output.state === "unknown") return "The output could not be proven off: treat the terminals as live";
  switch (status) {
    case "running":
      return "Between two points";
    case "finished":
    case "stopped":
      return "The run is over; the output is off";
    default:
      return "No point is being measured; the output is off";
  }
}

function averagingSentence(state: RunState, active: ActivePoint): string {
  const readings = state.setup?.plan.points[active.point]?.readings ?? active.averaged;
  const how = active.assessment ? `${active.assessment.sentence}. ` : "";
  return `${how}Averaging: ${active.averaged} of ${readings} readings`;
}

/** How far the bar stands, 0 to 1. */
export function nowProgress({ active }: RunState): number {
  if (!active) return 0;
  if (active.phase === "averaging" || active.phase === "de-energising") return 1;
  return active.phase === "settling" ? (active.assessment?.progress ?? 0) : 0;
}
