import path from "node:path";
import { QueryTypes } from "sequelize";
import sqlite3 from "sqlite3";
import type { RunEvent } from "@/lib/schemas/run-event";
import { ohms } from "@/lib/units/quantities";
import { temporaryDataFolder } from "../support/server-process";
import { openTestJournal, type TestJournal } from "../support/test-journal";
import { percentile, printFigure } from "./figure";

const BATCH = 100;
const BATCHES = 200;
const ROUNDS = 3;

/** Readings stored a second in batches of 100, and the same rows by plain sqlite3 in the same run; medians of rounds taken in turn. */
export async function measureJournalAppend(): Promise<void> {
  const own: number[] = [];
  const plain: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    const test = await openTestJournal();
    own.push(await throughJournal(test));
    plain.push(await throughPlainSqlite(test));
    await test.close();
  }
  const [ownRate, plainRate] = [percentile(own, 0.5), percentile(plain, 0.5)];
  printFigure("readings_appended", ownRate, "rows/s");
  printFigure("plain_sqlite3_same_rows", plainRate, "rows/s");
  printFigure("readings_appended_of_plain", ownRate / plainRate, "ratio");
}

function reading(seq: number): RunEvent {
  return {
    seq,
    atMs: 1_790_000_000_000 + seq,
    elapsedMs: seq,
    type: "reading.taken",
    data: {
      point: 0,
      attempt: 1,
      phase: "settling",
      ohms: ohms(1e9 + seq),
      volts: 500,
      amperes: 5e-7,
      flags: [],
      raw: "+1.00000E+09",
    },
  };
}

async function throughJournal({ journal, runId, started }: TestJournal): Promise<number> {
  const batches = Array.from({ length: BATCHES }, (_, batch) =>
    Array.from({ length: BATCH }, (_, row) => reading(started.lastSeq + 1 + batch * BATCH + row)),
  );
  const from = performance.now();
  for (const records of batches) await journal.append(runId, records);
  return rate(from);
}

/** The same rows into the same table, in a database of its own with the same durability and one transaction a batch. */
async function throughPlainSqlite({ database }: TestJournal): Promise<number> {
  const [table] = await database.sequelize.query<{ sql: string }>(
    "SELECT sql FROM sqlite_master WHERE name = 'readings'",
    {
      type: QueryTypes.SELECT,
    },
  );
  const { dataFolder, remove } = temporaryDataFolder();
  const plain = new sqlite3.Database(path.join(dataFolder, "plain.sqlite"));
  const run = (sql: string, values: unknown[] = []) =>
    new Promise<void>((resolve, reject) => plain.run(sql, values, (error) => (error ? reject(error) : resolve())));
  await run("PRAGMA journal_mode = WAL");
  await run("PRAGMA synchronous = FULL");
  await run(table!.sql.replace(/REFERENCES runs\s*\(id\)/u, ""));
  const places = Array.from({ length: BATCH }, () => "(?,?,?,?,?,?,?,?,?,?,?,?)").join(",");
  const from = performance.now();
  for (let batch = 0; batch < BATCHES; batch += 1) {
    const values = Array.from({ length: BATCH }, (_, row) => plainRow(1 + batch * BATCH + row)).flat();
    await run("BEGIN IMMEDIATE");
    await run(`INSERT INTO readings VALUES ${places}`, values);
    await run("COMMIT");
  }
  const result = rate(from);
  await new Promise<void>((resolve) => plain.close(() => resolve()));
  remove();
  return result;
}

function plainRow(seq: number): unknown[] {
  return [
    "00000000-0000-4000-8000-000000000000",
    seq,
    1_790_000_000_000 + seq,
    seq,
    0,
    1,
    "settling",
    1e9 + seq,
    500,
    5e-7,
    "",
    "+1.00000E+09",
  ];
}

function rate(from: number): number {
  return (BATCH * BATCHES * 1000) / (performance.now() - from);
}
