import { eventFields, readingFields, type StoredField } from "@/lib/journal/canonical-record";
import { readingAt } from "@/lib/journal/columns";
import type { ReadingColumns } from "@/lib/schemas/journal-columns";
import { parseRunEvent, type ReadingFlag, type ReadingPhase, type RunEvent } from "@/lib/schemas/run-event";

/** Columns in the order of `eventFields`. */
export const EVENT_COLUMNS = ["seq", "at_ms", "elapsed_ms", "type", "data"] as const;
/** Columns in the order of `readingFields`. */
export const READING_COLUMNS = [
  ...["seq", "at_ms", "elapsed_ms", "point", "attempt", "phase"],
  ...["ohms", "volts", "amperes", "flags", "raw"],
] as const;

export interface EventRow {
  seq: number;
  at_ms: number;
  elapsed_ms: number;
  type: string;
  data: string;
}

export interface ReadingRow {
  seq: number;
  at_ms: number;
  elapsed_ms: number;
  point: number;
  attempt: number;
  phase: ReadingPhase;
  ohms: number | null;
  volts: number | null;
  amperes: number | null;
  flags: string;
  raw: string;
}

/** A row of the two tables together: of an event when it has `data`, else of a reading. */
export type RecordRow = (EventRow & { data: string }) | (ReadingRow & { data: null });

const list = (columns: readonly string[]) => columns.join(", ");

/** One statement, so that both tables are seen at one moment. */
export const RECORDS_SQL = `
  SELECT ${list(EVENT_COLUMNS)}, NULL AS point, NULL AS attempt, NULL AS phase,
    NULL AS ohms, NULL AS volts, NULL AS amperes, NULL AS flags, NULL AS raw
  FROM run_events WHERE run_id = $1 AND seq > $2
  UNION ALL
  SELECT seq, at_ms, elapsed_ms, NULL, NULL, point, attempt, phase, ohms, volts, amperes, flags, raw
  FROM readings WHERE run_id = $1 AND seq > $2
  ORDER BY seq LIMIT $3`;

export const EVENTS_SQL = `
  SELECT ${list(EVENT_COLUMNS)} FROM run_events WHERE run_id = $1 AND seq <= $2 ORDER BY seq`;

export const READINGS_SQL = `
  SELECT ${list(READING_COLUMNS)} FROM readings WHERE run_id = $1 AND seq > $2 AND seq <= $3 ORDER BY seq LIMIT $4`;

export const READINGS_OF_POINT_SQL = `
  SELECT ${list(READING_COLUMNS)} FROM readings
  WHERE run_id = $1 AND seq > $2 AND seq <= $3 AND point = $5 ORDER BY seq LIMIT $4`;

/** Rows of the two tables for a batch of records, in the order of their columns. */
export function toRows(records: readonly RunEvent[]): { events: StoredField[][]; readings: StoredField[][] } {
  const events: StoredField[][] = [];
  const readings: StoredField[][] = [];
  for (const record of records) {
    if (record.type === "reading.taken") readings.push(readingFields(record));
    else events.push(eventFields(record));
  }
  return { events, readings };
}

/** The stored fields of a row, as the hash chain covers them. */
export function fieldsOf(row: RecordRow): StoredField[] {
  if (row.data !== null) return EVENT_COLUMNS.map((column) => row[column]);
  return READING_COLUMNS.map((column) => row[column as keyof ReadingRow]);
}

/** Throws ZodError for a row that is not a record any more. */
export function toRecord(row: RecordRow): RunEvent {
  if (row.data !== null) return toEvent(row);
  const columns = emptyColumns();
  addReading(columns, row);
  return readingAt(columns, 0);
}

export function toEvent({ seq, at_ms, elapsed_ms, type, data }: EventRow): RunEvent {
  return parseRunEvent({ seq, atMs: at_ms, elapsedMs: elapsed_ms, type, data: JSON.parse(data) });
}

export function emptyColumns(): ReadingColumns {
  return {
    ...{ seq: [], atMs: [], elapsedMs: [], point: [], attempt: [], phase: [] },
    ...{ ohms: [], volts: [], amperes: [], flags: [], raw: [] },
  };
}

export function addReading(columns: ReadingColumns, row: ReadingRow): void {
  columns.seq.push(row.seq);
  columns.atMs.push(row.at_ms);
  columns.elapsedMs.push(row.elapsed_ms);
  columns.point.push(row.point);
  columns.attempt.push(row.attempt);
  columns.phase.push(row.phase);
  columns.ohms.push(row.ohms);
  columns.volts.push(row.volts);
  columns.amperes.push(row.amperes);
  columns.flags.push(row.flags === "" ? [] : (row.flags.split(",") as ReadingFlag[]));
  columns.raw.push(row.raw);
}
