import type { DisplayRange } from "@/lib/schemas/instrument";
import type { SettlingPolicy } from "@/lib/schemas/settling";

/** One display value at its time since the output was switched on. */
export interface SettlingSample {
  seconds: number;
  /** Null when the display is over its range. */
  ohms: number | null;
}

/** What the detector remembers between samples. Plain JSON of bounded size. */
export interface SettlingWatch {
  policy: SettlingPolicy;
  /** R·C of the point plus the tester's filter. */
  timeConstantSeconds: number;
  ranges: DisplayRange[];
  samples: SettlingSample[];
  /** Time of the latest change of the display, and the longest time between two changes so far. */
  lastStepSeconds: number;
  longestStepSeconds: number;
}

/** How near a point is to settled. */
export interface SettlingAssessment {
  state: "watching" | "settled" | "unsettled";
  /** 0 to 1, for the bar. */
  progress: number;
  /** Slope over the window in per cent of the value a minute; null while the window is too short. */
  driftPercentPerMinute: number | null;
  /** Start of the watching window, in seconds since the output was switched on. */
  windowFromSeconds: number;
  /** What is still missing, as a sentence; or how it settled. */
  sentence: string;
  /** Value the trace is heading for, by an exponential fit; null when the fit says nothing. */
  expectedOhms: number | null;
  /** Time constant of that fit. */
  fittedSeconds: number | null;
}
