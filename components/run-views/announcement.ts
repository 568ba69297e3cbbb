import type { RunState } from "@/lib/journal/run-state";

/** The newest line that is worth saying aloud: a point that is done, trouble, or what a person did. Never a single reading. */
export function announcement(state: RunState): string {
  return state.lines.findLast((line) => line.tone !== "plain" || state.endedAtMs === line.atMs)?.text ?? "";
}
