import type { SettlingAssessment, SettlingWatch } from "@/lib/metrology/settling";
import type { OutputState } from "@/lib/schemas/bench";
import type { Actor } from "@/lib/schemas/person";
import type { Judgement, ReadingPhase, RunEventData, Trouble } from "@/lib/schemas/run-event";
import type { RunStatus } from "@/lib/schemas/run";

/** What a point has come to so far. */
export interface PointState {
  /** Attempts begun; 0 before the first. */
  attempts: number;
  outcome: "open" | "judged" | "skipped";
  judgement: Judgement | null;
  /** Run time of the judgement. */
  judgedElapsedMs: number | null;
}

/** Steps of one attempt, in their order. */
export type PointPhase = "discharging" | "setting" | "energising" | "settling" | "averaging" | "de-energising";

export interface TraceSample {
  /** Seconds since the output was switched on. */
  seconds: number;
  /** Null when the display was over its range. */
  ohms: number | null;
  phase: ReadingPhase;
}

/** The attempt under way. */
export interface ActivePoint {
  point: number;
  attempt: number;
  phase: PointPhase;
  /** Run time at which the output was switched on in this attempt. */
  onSinceMs: number | null;
  /** The latest reading. */
  indicationOhms: number | null;
  overRange: boolean;
  terminalVolts: number | null;
  terminalAmperes: number | null;
  /** Thinned evenly when it grows long, so that its size is bounded. */
  trace: TraceSample[];
  /** Keep every `traceStride`-th sample. */
  traceStride: number;
  samples: number;
  watch: SettlingWatch | null;
  assessment: SettlingAssessment | null;
  /** Readings averaged so far. */
  averaged: number;
}

export interface JournalLine {
  seq: number;
  atMs: number;
  elapsedMs: number;
  text: string;
  tone: "plain" | "inside" | "doubtful" | "outside" | "unsettled" | "trouble" | "person";
}

/** A run as its journal tells it. Plain JSON; the only account of a run. */
export interface RunState {
  lastSeq: number;
  /** Time stamps of the latest record. */
  atMs: number;
  elapsedMs: number;
  status: "empty" | RunStatus;
  setup: RunEventData<"run.started"> | null;
  startedAtMs: number | null;
  endedAtMs: number | null;
  points: PointState[];
  active: ActivePoint | null;
  /** Dial positions as last read back. */
  dials: number[] | null;
  output: OutputState;
  trouble: Trouble | null;
  hold: { by: Actor; reason: string | null; atMs: number } | null;
  /** Why the run was interrupted, while it is. */
  interruption: { reason: string; atMs: number } | null;
  /** The newest lines of the journal in words, oldest first. */
  lines: JournalLine[];
}

/** How many journal lines the state keeps. */
export const KEPT_LINES = 40;

export const emptyRun: RunState = {
  lastSeq: 0,
  atMs: 0,
  elapsedMs: 0,
  status: "empty",
  setup: null,
  startedAtMs: null,
  endedAtMs: null,
  points: [],
  active: null,
  dials: null,
  output: { state: "unknown", volts: null },
  trouble: null,
  hold: null,
  interruption: null,
  lines: [],
};
