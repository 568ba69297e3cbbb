import type { ReadingFlag, ReadingPhase, RunEvent } from "./run-event";

/** Readings of a run as columns, so that a million of them are not a million objects. All columns are of one length. */
export interface ReadingColumns {
  seq: number[];
  atMs: number[];
  elapsedMs: number[];
  point: number[];
  attempt: number[];
  phase: ReadingPhase[];
  ohms: (number | null)[];
  volts: (number | null)[];
  amperes: (number | null)[];
  flags: ReadingFlag[][];
  raw: string[];
}

/** A whole journal: its events without readings, and its readings apart. */
export interface JournalColumns {
  events: RunEvent[];
  readings: ReadingColumns;
}
