import type { JournalColumns, ReadingColumns } from "@/lib/schemas/journal-columns";
import type { RunEvent, RunEventOf } from "@/lib/schemas/run-event";

/** The reading at one index of the columns, as a journal record. */
export function readingAt(columns: ReadingColumns, index: number): RunEventOf<"reading.taken"> {
  return {
    seq: columns.seq[index]!,
    atMs: columns.atMs[index]!,
    elapsedMs: columns.elapsedMs[index]!,
    type: "reading.taken",
    data: {
      point: columns.point[index]!,
      attempt: columns.attempt[index]!,
      phase: columns.phase[index]!,
      ohms: columns.ohms[index] as RunEventOf<"reading.taken">["data"]["ohms"],
      volts: columns.volts[index]!,
      amperes: columns.amperes[index]!,
      flags: columns.flags[index]!,
      raw: columns.raw[index]!,
    },
  };
}

/** Events and readings in one sequence by `seq`. */
export function mergeColumns({ events, readings }: JournalColumns): RunEvent[] {
  const merged: RunEvent[] = [];
  let nextReading = 0;
  for (const event of events) {
    while (nextReading < readings.seq.length && readings.seq[nextReading]! < event.seq)
      merged.push(readingAt(readings, nextReading++));
    merged.push(event);
  }
  while (nextReading < readings.seq.length) merged.push(readingAt(readings, nextReading++));
  return merged;
}
