import { describeEvent } from "@/lib/journal/describe-event";
import type { JournalLine } from "@/lib/journal/run-state";
import type { RunEvent, RunEventType } from "@/lib/schemas/run-event";

const TURNS: readonly RunEventType[] = [
  "run.held",
  "run.resumed",
  "run.faulted",
  "run.interrupted",
  "run.stopped",
  "point.skipped",
  "point.abandoned",
  "device.recovered",
  "output.unproven",
];

/** What did not go straight on in a run: holds, faults, repeated attempts. Empty for a run without any. */
export function courseOfRun(events: readonly RunEvent[]): JournalLine[] {
  return linesOf(
    events.filter((event) => TURNS.includes(event.type) || isRepeat(event)),
    events,
  );
}

/** Journal records in words. `events` begins with the start of the run, which names its points. */
export function linesOf(chosen: readonly RunEvent[], events: readonly RunEvent[]): JournalLine[] {
  const start = events.find((event) => event.type === "run.started");
  return chosen.map((event) => ({
    seq: event.seq,
    atMs: event.atMs,
    elapsedMs: event.elapsedMs,
    ...describeEvent(event, start?.data ?? null),
  }));
}

function isRepeat(event: RunEvent): boolean {
  return event.type === "point.started" && event.data.attempt > 1;
}

/** Events of a run with the number of readings taken since the one before. */
export interface JournalRow {
  line: JournalLine;
  readingsBefore: number;
}

/** Readings have the numbers between two events, so counting them needs no reading. */
export function journalRows(events: readonly RunEvent[]): JournalRow[] {
  return linesOf(events, events).map((line, index) => ({
    line,
    readingsBefore: line.seq - (events[index - 1]?.seq ?? 0) - 1,
  }));
}
