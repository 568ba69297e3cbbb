import { createHash } from "node:crypto";
import { QueryTypes, type Transaction } from "sequelize";
import { canonicalText, type StoredField } from "@/lib/journal/canonical-record";
import { JournalGapError } from "@/lib/journal/journal-gap-error";
import type { ReadingColumns } from "@/lib/schemas/journal-columns";
import type { RunEvent } from "@/lib/schemas/run-event";
import { insertRows } from "./insert-rows";
import * as rows from "./journal-rows";
import type { Database } from "./open-database";
import type { JournalRepository } from "./repositories";

/** The end of a run's journal. */
interface Tail {
  lastSeq: number;
  hash: string;
}

interface Batch {
  first_seq: number;
  last_seq: number;
  hash: string;
}

/** Rows read at a time, so that a long journal does not fill the memory. */
const PAGE = 10_000;

export function createJournalRepository(database: Database): JournalRepository {
  /** Ends of the journals that this process writes: saves a query for each batch. */
  const tails = new Map<string, Tail>();

  const select = <T extends object>(sql: string, bind: StoredField[], transaction?: Transaction) =>
    database.sequelize.query<T>(sql, { type: QueryTypes.SELECT, bind, transaction: transaction ?? null });

  const readTail = async (runId: string, transaction?: Transaction): Promise<Tail> => {
    const sql = "SELECT last_seq, hash FROM journal_batches WHERE run_id = $1 ORDER BY last_seq DESC LIMIT 1";
    const [row] = await select<Batch>(sql, [runId], transaction);
    return row ? { lastSeq: row.last_seq, hash: row.hash } : { lastSeq: 0, hash: runId };
  };

  const append = async (runId: string, records: RunEvent[]) => {
    const first = records[0];
    if (!first) return;
    const { events, readings } = rows.toRows(records);
    const text = textInOrder(events, readings);
    try {
      const tail = await database.write(async (transaction) => {
        const before = tails.get(runId) ?? (await readTail(runId, transaction));
        const lastSeq = requireContiguous(records, before.lastSeq);
        const hash = chainHash(before.hash, text);
        await insertRows(transaction, "run_events", ["run_id", ...rows.EVENT_COLUMNS], ownedBy(runId, events));
        await insertRows(transaction, "readings", ["run_id", ...rows.READING_COLUMNS], ownedBy(runId, readings));
        await insertRows(transaction, "journal_batches", BATCH_COLUMNS, [[runId, first.seq, lastSeq, hash]]);
        return { lastSeq, hash };
      });
      tails.set(runId, tail);
    } catch (error) {
      // Whether a failed commit reached the disk is for the database to say.
      tails.delete(runId);
      throw error;
    }
  };

  const lastSeq = async (runId: string) => (tails.get(runId) ?? (await readTail(runId))).lastSeq;

  const readings = async (runId: string, upTo: number, point?: number): Promise<ReadingColumns> => {
    const columns = rows.emptyColumns();
    const sql = point === undefined ? rows.READINGS_SQL : rows.READINGS_OF_POINT_SQL;
    for (;;) {
      const limits = [runId, columns.seq.at(-1) ?? 0, upTo, PAGE];
      const page = await select<rows.ReadingRow>(sql, point === undefined ? limits : [...limits, point]);
      for (const row of page) rows.addReading(columns, row);
      if (page.length < PAGE) return columns;
    }
  };

  const events = async (runId: string, upTo: number) =>
    (await select<rows.EventRow>(rows.EVENTS_SQL, [runId, upTo])).map(rows.toEvent);

  const storedRows = async function* (runId: string): AsyncGenerator<rows.RecordRow, undefined> {
    for (let afterSeq = Number.MIN_SAFE_INTEGER; ;) {
      const page = await select<rows.RecordRow>(rows.RECORDS_SQL, [runId, afterSeq, PAGE]);
      yield* page;
      if (page.length < PAGE) return;
      afterSeq = page.at(-1)!.seq;
    }
  };

  return {
    append,
    lastSeq,
    records: async (runId, { afterSeq, limit }) =>
      (await select<rows.RecordRow>(rows.RECORDS_SQL, [runId, afterSeq, limit])).map(rows.toRecord),
    events: async (runId) => events(runId, await lastSeq(runId)),
    readings: async (runId, { point }) => readings(runId, await lastSeq(runId), point),
    columns: async (runId) => {
      const upTo = await lastSeq(runId);
      return { events: await events(runId, upTo), readings: await readings(runId, upTo) };
    },
    verifyChain: async (runId) => {
      const sql = "SELECT first_seq, last_seq, hash FROM journal_batches WHERE run_id = $1 ORDER BY last_seq";
      return verifyBatches(runId, await select<Batch>(sql, [runId]), storedRows(runId));
    },
  };
}

const BATCH_COLUMNS = ["run_id", "first_seq", "last_seq", "hash"];

/** Walks batches and rows together; each batch's hash covers all before it. */
async function verifyBatches(
  runId: string,
  batches: readonly Batch[],
  stored: AsyncGenerator<rows.RecordRow, undefined>,
): ReturnType<JournalRepository["verifyChain"]> {
  let previous = runId;
  let next = 1;
  for (const batch of batches) {
    const firstSeq = next;
    const hash = createHash("sha256").update(previous);
    let isWhole = batch.first_seq === firstSeq;
    for (; isWhole && next <= batch.last_seq; next += 1) {
      const { value: row } = await stored.next();
      isWhole = row?.seq === next;
      if (row) hash.update(canonicalText(rows.fieldsOf(row)));
    }
    previous = hash.digest("hex");
    if (!isWhole || previous !== batch.hash) return { intact: false, firstBadSeq: firstSeq };
  }
  const { value: beyond } = await stored.next();
  return beyond ? { intact: false, firstBadSeq: beyond.seq } : { intact: true };
}

/** The last `seq` of the records. Throws JournalGapError unless they go on from `lastSeq` one by one. */
function requireContiguous(records: readonly RunEvent[], lastSeq: number): number {
  let last = lastSeq;
  for (const { seq } of records) {
    if (seq !== last + 1) throw new JournalGapError(last, seq);
    last = seq;
  }
  return last;
}

/** Both kinds of rows begin with their `seq` and are in order, so they are merged by it. */
function textInOrder(events: readonly StoredField[][], readings: readonly StoredField[][]): string {
  const all = [...events, ...readings].sort((a, b) => Number(a[0]) - Number(b[0]));
  return all.map(canonicalText).join("");
}

function chainHash(previous: string, text: string): string {
  return createHash("sha256").update(previous).update(text).digest("hex");
}

function ownedBy(runId: string, fields: readonly StoredField[][]): StoredField[][] {
  return fields.map((row) => [runId, ...row]);
}
