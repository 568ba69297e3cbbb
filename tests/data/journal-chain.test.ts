import fc from "fast-check";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { RunEvent } from "@/lib/schemas/run-event";
import { journalOf } from "../support/journal-builder";
import { openTestRegister, reserveRun, type TestDatabase } from "./test-database";

const TABLES = ["run_events", "readings", "journal_batches"];

const records = journalOf((run) => {
  run.started();
  for (const point of [0, 1, 2, 3]) {
    run.pointStarted(point).offProven().switchingOn().switchedOn();
    for (let reading = 0; reading < 5; reading += 1) run.reading((point + 1) * 1e9 + reading * 1e7);
    run.judged(point, "inside");
  }
  run.finished();
}).records;

/** Batches of 1, 2, 3, 4, 5 … records. */
const batches = toBatches(records);

function toBatches(all: readonly RunEvent[]): RunEvent[][] {
  const found: RunEvent[][] = [];
  for (let from = 0, size = 1; from < all.length; from += size - 1) found.push(all.slice(from, from + size++));
  return found;
}

let opened: TestDatabase;

/** The triggers are dropped and a copy of each table is kept, so that each trial begins with the journal as written. */
beforeAll(async () => {
  opened = await openTestRegister();
  await reserveRun(opened, "run");
  for (const batch of batches) await opened.repositories.journal.append("run", batch);
  for (const table of TABLES) {
    await opened.run(`DROP TRIGGER ${table}_no_update`);
    await opened.run(`DROP TRIGGER ${table}_no_delete`);
    await opened.run(`CREATE TABLE ${table}_as_written AS SELECT * FROM ${table}`);
  }
});

afterAll(() => opened.close());

beforeEach(restore);

async function restore(): Promise<void> {
  for (const table of TABLES) {
    await opened.run(`DELETE FROM ${table}`);
    await opened.run(`INSERT INTO ${table} SELECT * FROM ${table}_as_written`);
  }
}

const verify = () => opened.repositories.journal.verifyChain("run");

/** First record of the batch that holds a record. */
function batchStart(seq: number): number {
  return batches.find((batch) => batch.some((record) => record.seq === seq))![0]!.seq;
}

const anySeq = fc.constantFrom(...records.map(({ seq }) => seq));
const tableOf = (seq: number) => (records[seq - 1]!.type === "reading.taken" ? "readings" : "run_events");

/** What each column can be altered to, as SQL over its old value. */
const alterations: Readonly<Record<string, readonly [column: string, change: string][]>> = {
  readings: [
    ["ohms", "ohms * 1.000000000000001"],
    ["ohms", "NULL"],
    ["volts", "0.0"],
    ["at_ms", "at_ms + 1"],
    ["elapsed_ms", "elapsed_ms - 1"],
    ["point", "point + 1"],
    ["attempt", "attempt + 1"],
    ["phase", "'averaging'"],
    ["flags", "'repeated'"],
    ["raw", "raw || ' '"],
  ],
  run_events: [
    ["at_ms", "at_ms + 1"],
    ["elapsed_ms", "elapsed_ms + 1"],
    ["type", "type || 'x'"],
    ["data", "data || ' '"],
    ["data", "substr(data, 1, length(data) - 1)"],
    ["data", "'{\"forged\":1,' || substr(data, 2)"],
  ],
};

describe("the chain of a journal", () => {
  it("holds as written", async () => {
    expect(batches.length).toBeGreaterThan(5);
    expect(await verify()).toEqual({ intact: true });
  });

  it("shows any altered field of any one record, and in which batch", async () => {
    const property = fc.asyncProperty(anySeq, fc.nat(), async (seq, choice) => {
      const table = tableOf(seq);
      const changes = alterations[table]!;
      const [column, change] = changes[choice % changes.length]!;
      await opened.run(`UPDATE ${table} SET ${column} = ${change} WHERE seq = ${seq}`);
      expect(await verify(), `${column} of record ${seq}`).toEqual({ intact: false, firstBadSeq: batchStart(seq) });
      await restore();
    });
    await fc.assert(property, { numRuns: 80 });
  });

  it("shows any one byte of an event that was altered", async () => {
    const events = records.filter(({ type }) => type !== "reading.taken");
    const property = fc.asyncProperty(fc.constantFrom(...events), fc.nat(), async ({ seq }, place) => {
      const [row] = await opened.rows<{ data: string }>(`SELECT data FROM run_events WHERE seq = ${seq}`);
      const at = place % row!.data.length;
      const other = row!.data[at] === "7" ? "8" : "7";
      const forged = row!.data.slice(0, at) + other + row!.data.slice(at + 1);
      await opened.run(`UPDATE run_events SET data = '${forged.replace(/'/gu, "''")}' WHERE seq = ${seq}`);
      expect(await verify()).toEqual({ intact: false, firstBadSeq: batchStart(seq) });
      await restore();
    });
    await fc.assert(property, { numRuns: 60 });
  });

  it("shows any one record that was taken out", async () => {
    const property = fc.asyncProperty(anySeq, async (seq) => {
      await opened.run(`DELETE FROM ${tableOf(seq)} WHERE seq = ${seq}`);
      expect(await verify()).toEqual({ intact: false, firstBadSeq: batchStart(seq) });
      await restore();
    });
    await fc.assert(property, { numRuns: 30 });
  });

  it("shows two records that changed places", async () => {
    const property = fc.asyncProperty(fc.uniqueArray(anySeq, { minLength: 2, maxLength: 2 }), async (pair) => {
      const [a, b] = [Math.min(...pair), Math.max(...pair)];
      for (const table of ["run_events", "readings"]) {
        await opened.run(`UPDATE ${table} SET seq = -1 WHERE seq = ${a}`);
        await opened.run(`UPDATE ${table} SET seq = ${a} WHERE seq = ${b}`);
        await opened.run(`UPDATE ${table} SET seq = ${b} WHERE seq = -1`);
      }
      expect(await verify()).toEqual({ intact: false, firstBadSeq: batchStart(a) });
      await restore();
    });
    await fc.assert(property, { numRuns: 30 });
  });

  it.each([
    ["before the first", 0, 1],
    ["beside another of its number", 5, 4],
    ["after the last", records.length + 1, records.length + 1],
  ])("shows a record that was put in %s", async (_, seq, firstBadSeq) => {
    const other = seq === 5 ? "readings" : "run_events";
    const source = await opened.rows<object>(`SELECT * FROM ${other}_as_written LIMIT 1`);
    const columns = Object.keys(source[0]!).map((column) => (column === "seq" ? String(seq) : column));
    await opened.run(`INSERT INTO ${other} SELECT ${columns.join(",")} FROM ${other}_as_written LIMIT 1`);
    expect(await verify()).toEqual({ intact: false, firstBadSeq });
  });

  it.each([
    ["an altered hash", `UPDATE journal_batches SET hash = 'a' || substr(hash, 2) WHERE first_seq = 4`, 4],
    ["an altered border of two batches", `UPDATE journal_batches SET first_seq = 5 WHERE first_seq = 4`, 4],
    ["an altered end of a batch", `UPDATE journal_batches SET last_seq = 5 WHERE first_seq = 4`, 4],
    ["a batch that is missing", `DELETE FROM journal_batches WHERE first_seq = 4`, 4],
  ])("shows %s", async (_, statement, firstBadSeq) => {
    await opened.run(statement);
    expect(await verify()).toEqual({ intact: false, firstBadSeq });
  });

  it("shows a journal that was put under another run", async () => {
    await reserveRun(opened, "other", "window");
    for (const table of TABLES) await opened.run(`UPDATE ${table} SET run_id = 'other'`);
    expect(await opened.repositories.journal.verifyChain("other")).toEqual({ intact: false, firstBadSeq: 1 });
  });
});
