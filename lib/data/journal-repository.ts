import { createHash } from "node:crypto";
import { QueryTypes, type Transaction } from "sequelize";
import { canonicalRecord } from "@/lib/journal/canonical-record";
import { readingAt } from "@/lib/journal/columns";
import { JournalGapError } from "@/lib/journal/journal-gap-error";
import type { ReadingColumns } from "@/lib/schemas/journal-columns";
import { parseRunEvent, type ReadingFlag, type ReadingPhase, type RunEvent, type RunEventOf } from "@/lib/schemas/run-event";
import type { Database } from "./open-database";
import type { JournalRepository } from "./repositories";

type Reading = RunEventOf<"reading.taken">;

interface EventRow {
  seq: number;
  at_ms: number;
  elapsed_ms: number;
  type: string;
  data: string;
}

interface ReadingRow {
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

interface Tail {
  lastSeq: number;
  hash: string;
}

/** SQLite takes at most 32,766 bound values a statement. */
const ROWS_PER_STATEMENT = 500;
/** Records read at a time when the whole chain is verified. */
const VERIFY_PAGE = 5000;

const READING_COLUMNS = "seq, at_ms, elapsed_ms, point, attempt, phase, ohms, volts, amperes, flags, raw";

export function createJournalRepository(database: Database): JournalRepository {
  const { sequelize } = database;
  /** Ends of the journals written by this process: saves a query for each batch. */
  const tails = new Map<string, Tail>();

  const select = <T extends object>(sql: string, replacements: unknown[]) =>
    sequelize.query<T>(sql, { type: QueryTypes.SELECT, replacements });

  const tailOf = async (runId: string): Promise<Tail> => {
    const known = tails.get(runId);
    if (known) return known;
    const [row] = await select<{ last_seq: number; hash: string }>(
      "SELECT last_seq, hash FROM journal_batches WHERE run_id = ? ORDER BY last_seq DESC LIMIT 1",
      [runId],
    );
    return row ? { lastSeq: row.last_seq, hash: row.hash } : { lastSeq: 0, hash: "" };
  };

  const insert = async (table: string, columns: string, rows: unknown[][], transaction: Transaction) => {
    for (let from = 0; from < rows.length; from += ROWS_PER_STATEMENT) {
      const part = rows.slice(from, from + ROWS_PER_STATEMENT);
      const places = `(${part[0]!.map(() => "?").join(",")})`;
      await sequelize.query(`INSERT INTO ${table} (${columns}) VALUES ${part.map(() => places).join(",")}`, {
        bind: undefined,
        replacements: part.flat(),
        transaction,
        type: QueryTypes.INSERT,
      });
    }
  };

  const append = async (runId: string, records: RunEvent[]) => {
    const first = records[0];
    if (!first) return;
    await database.write(async (transaction) => {
      const tail = await tailOf(runId);
      requireContiguous(records, tail.lastSeq);
      const hash = chainHash(tail.hash, records);
      const lastSeq = records.at(-1)!.seq;
      const readings = records.filter((record): record is Reading => record.type === "reading.taken");
      const events = records.filter((record) => record.type !== "reading.taken");
      await insert("run_events", "run_id, seq, at_ms, elapsed_ms, type, data", events.map((record) => eventValues(runId, record)), transaction);
      await insert("readings", `run_id, ${READING_COLUMNS}`, readings.map((record) => readingValues(runId, record)), transaction);
      await insert("journal_batches", "run_id, first_seq, last_seq, hash", [[runId, first.seq, lastSeq, hash]], transaction);
      return { lastSeq, hash };
    }).then((tail) => tails.set(runId, tail));
  };

  const records: JournalRepository["records"] = async (runId, { afterSeq, limit }) => {
    const [events, readings] = await Promise.all([
      select<EventRow>("SELECT seq, at_ms, elapsed_ms, type, data FROM run_events WHERE run_id = ? AND seq > ? ORDER BY seq LIMIT ?", [runId, afterSeq, limit]),
      select<ReadingRow>(`SELECT ${READING_COLUMNS} FROM readings WHERE run_id = ? AND seq > ? ORDER BY seq LIMIT ?`, [runId, afterSeq, limit]),
    ]);
    const columns = toColumns(readings);
    const all = [...events.map(toEvent), ...readings.map((_, index) => readingAt(columns, index))];
    return all.sort((a, b) => a.seq - b.seq).slice(0, limit);
  };

  const verifyChain: JournalRepository["verifyChain"] = async (runId) => {
    const batches = await select<{ first_seq: number; last_seq: number; hash: string }>(
      "SELECT first_seq, last_seq, hash FROM journal_batches WHERE run_id = ? ORDER BY last_seq",
      [runId],
    );
    let hash = "";
    let lastSeq = 0;
    for (const batch of batches) {
      const found = await recordsUpTo(records, runId, lastSeq, batch.last_seq);
      const isWhole = batch.first_seq === lastSeq + 1 && found.every((record, index) => record.seq === lastSeq + 1 + index);
      hash = chainHash(hash, found);
      if (!isWhole || hash !== batch.hash) return { intact: false, firstBadSeq: batch.first_seq };
      lastSeq = batch.last_seq;
    }
    const [beyond] = await records(runId, { afterSeq: lastSeq, limit: 1 });
    return beyond ? { intact: false, firstBadSeq: beyond.seq } : { intact: true };
  };

  return {
    append,
    records,
    verifyChain,
    events: async (runId) =>
      (await select<EventRow>("SELECT seq, at_ms, elapsed_ms, type, data FROM run_events WHERE run_id = ? ORDER BY seq", [runId])).map(toEvent),
    readings: async (runId, { point }) =>
      toColumns(
        point === undefined
          ? await select<ReadingRow>(`SELECT ${READING_COLUMNS} FROM readings WHERE run_id = ? ORDER BY seq`, [runId])
          : await select<ReadingRow>(`SELECT ${READING_COLUMNS} FROM readings WHERE run_id = ? AND point = ? ORDER BY seq`, [runId, point]),
      ),
    lastSeq: async (runId) => (await tailOf(runId)).lastSeq,
  };
}

async function recordsUpTo(read: JournalRepository["records"], runId: string, afterSeq: number, lastSeq: number): Promise<RunEvent[]> {
  const found: RunEvent[] = [];
  for (let from = afterSeq; from < lastSeq; ) {
    const page = (await read(runId, { afterSeq: from, limit: VERIFY_PAGE })).filter((record) => record.seq <= lastSeq);
    if (page.length === 0) break;
    found.push(...page);
    from = page.at(-1)!.seq;
  }
  return found;
}

function requireContiguous(records: readonly RunEvent[], lastSeq: number): void {
  let expected = lastSeq;
  for (const { seq } of records) {
    if (seq !== expected + 1) throw new JournalGapError(expected, seq);
    expected = seq;
  }
}

function chainHash(previous: string, records: readonly RunEvent[]): string {
  const hash = createHash("sha256").update(previous);
  hash.update(records.map(canonicalRecord).join(""));
  return hash.digest("hex");
}

function eventValues(runId: string, { seq, atMs, elapsedMs, type, data }: RunEvent): unknown[] {
  return [runId, seq, atMs, elapsedMs, type, JSON.stringify(data)];
}

function readingValues(runId: string, { seq, atMs, elapsedMs, data }: Reading): unknown[] {
  const { point, attempt, phase, ohms, volts, amperes, flags, raw } = data;
  return [runId, seq, atMs, elapsedMs, point, attempt, phase, ohms, volts, amperes, flags.join(","), raw];
}

function toEvent({ seq, at_ms, elapsed_ms, type, data }: EventRow): RunEvent {
  return parseRunEvent({ seq, atMs: at_ms, elapsedMs: elapsed_ms, type, data: JSON.parse(data) });
}

function toColumns(rows: readonly ReadingRow[]): ReadingColumns {
  return {
    seq: rows.map((row) => row.seq),
    atMs: rows.map((row) => row.at_ms),
    elapsedMs: rows.map((row) => row.elapsed_ms),
    point: rows.map((row) => row.point),
    attempt: rows.map((row) => row.attempt),
    phase: rows.map((row) => row.phase),
    ohms: rows.map((row) => row.ohms),
    volts: rows.map((row) => row.volts),
    amperes: rows.map((row) => row.amperes),
    flags: rows.map((row) => (row.flags === "" ? [] : (row.flags.split(",") as ReadingFlag[]))),
    raw: rows.map((row) => row.raw),
  };
}
