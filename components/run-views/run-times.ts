import type { RunState } from "@/lib/journal/run-state";
import { timeLeft } from "@/lib/journal/selectors";

/** Times of a run for people. */
export interface RunTimes {
  /** Bench time since the start. */
  runningSeconds: number;
  /** What is left by the clock on the wall; null when nothing is, or the run stands still. */
  left: { seconds: number; spreadSeconds: number; doneAtMs: number } | null;
}

/** A simulated bench's time may run faster than the wall's: what is left is told in the wall's time. */
export function runTimes(state: RunState, nowMs: number): RunTimes {
  const speed = state.setup?.clockSpeed ?? 1;
  const ahead = state.status === "running" ? timeLeft(state) : null;
  const left = ahead && {
    seconds: ahead.seconds / speed,
    spreadSeconds: ahead.spreadSeconds / speed,
    doneAtMs: nowMs + (ahead.seconds / speed) * 1000,
  };
  return { runningSeconds: state.elapsedMs / 1000, left };
}
