import fc from "fast-check";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { mergeColumns } from "@/lib/journal/columns";
import type { ReadingColumns } from "@/lib/schemas/journal-columns";
import type { RunEvent, RunEventOf } from "@/lib/schemas/run-event";
import { journalOf } from "../support/journal-builder";
import { anyReading, readingRecord } from "./any-record";
import { openTestRegister, reserveRun, type TestDatabase } from "./test-database";

let opened: TestDatabase;

beforeEach(async () => {
  opened = await openTestRegister();
  await reserveRun(opened, "run");
});

afterEach(() => opened.close());

/** A short run with every kind of thing in it: 1 start, then readings among events. */
const small = journalOf((run) => {
  run.started().pointStarted(0).offProven().switchingOn().switchedOn().reading(0.9e9).reading(0.99e9);
  run.judged(0, "inside").held({ id: "ines", name: "Ines Marlow" }).interrupted();
}).records;

const journal = () => opened.repositories.journal;

async function appendInBatches(records: readonly RunEvent[], size: number): Promise<void> {
  for (let from = 0; from < records.length; from += size)
    await journal().append("run", records.slice(from, from + size));
}

describe("a journal", () => {
  it.each([1, 3, 100])("gives back what was appended %i at a time, in order", async (size) => {
    await appendInBatches(small, size);
    expect(await journal().records("run", { afterSeq: 0, limit: 100 })).toEqual(small);
    expect(await journal().lastSeq("run")).toBe(small.length);
    expect(mergeColumns(await journal().columns("run"))).toEqual(small);
    expect(await journal().events("run")).toEqual(small.filter(({ type }) => type !== "reading.taken"));
  });

  it("is read from any place on, a part at a time", async () => {
    await appendInBatches(small, 4);
    expect(await journal().records("run", { afterSeq: 5, limit: 3 })).toEqual(small.slice(5, 8));
    expect(await journal().records("run", { afterSeq: small.length, limit: 3 })).toEqual([]);
  });

  it("is empty at first, and knows nothing of other runs", async () => {
    await reserveRun(opened, "other", "window");
    await journal().append("other", small);
    expect(await journal().records("run", { afterSeq: 0, limit: 10 })).toEqual([]);
    expect(await journal().lastSeq("run")).toBe(0);
    expect(await journal().columns("run")).toMatchObject({ events: [], readings: { seq: [], raw: [] } });
  });

  it("takes an empty batch for nothing", async () => {
    await journal().append("run", []);
    expect(await opened.rows("SELECT * FROM journal_batches")).toEqual([]);
  });

  it("keeps any reading to the last bit", async () => {
    await reserveRun(opened, "any", "window");
    let lastSeq = 0;
    const property = fc.asyncProperty(fc.array(anyReading, { minLength: 1, maxLength: 40 }), async (payloads) => {
      const records = payloads.map((data, index) => readingRecord(lastSeq + index + 1, data));
      await journal().append("any", records);
      expect(await journal().records("any", { afterSeq: lastSeq, limit: 100 })).toEqual(records);
      lastSeq += records.length;
    });
    await fc.assert(property, { numRuns: 60 });
    expect(await journal().verifyChain("any")).toEqual({ intact: true });
  });

  it("gives readings as columns of one length, those of one point apart", async () => {
    const readings = Array.from({ length: 25 }, (_, index) => readingRecord(index + 1, { point: index % 5 }));
    await journal().append("run", readings);
    const columns = await journal().readings("run", { point: 3 });
    expect(columns.seq).toEqual([4, 9, 14, 19, 24]);
    expect(Object.values(columns).map((column: unknown[]) => column.length)).toEqual(Array(11).fill(5));
    expect((await journal().readings("run", {})).seq).toHaveLength(25);
  });

  it("gives more readings than are read at a time", async () => {
    const readings = Array.from({ length: 20_001 }, (_, index) => readingRecord(index + 1, {}));
    await appendInBatches(readings, 5000);
    const columns: ReadingColumns = await journal().readings("run", {});
    expect(columns.seq).toEqual(readings.map(({ seq }) => seq));
    expect(await journal().verifyChain("run")).toEqual({ intact: true });
  });

  it("goes on where another start of the process left it", async () => {
    await journal().append("run", small.slice(0, 4));
    // A repository made anew knows no more than the database.
    const { createJournalRepository } = await import("@/lib/data/journal-repository");
    const later = createJournalRepository(opened.database);
    expect(await later.lastSeq("run")).toBe(4);
    await later.append("run", small.slice(4));
    expect(await later.verifyChain("run")).toEqual({ intact: true });
  });
});

describe("a batch", () => {
  it.each([
    ["leaves one out", [small[0]!, small[2]!], { lastSeq: 1, nextSeq: 3 }],
    ["begins too late", [small[1]!], { lastSeq: 0, nextSeq: 2 }],
    ["comes doubled", [small[0]!, small[0]!], { lastSeq: 1, nextSeq: 1 }],
  ])("that %s is refused as a gap and leaves nothing", async (_, records, gap) => {
    await expect(journal().append("run", records)).rejects.toMatchObject({ name: "JournalGapError", ...gap });
    expect(await journal().lastSeq("run")).toBe(0);
    await journal().append("run", small);
    expect(await journal().verifyChain("run")).toEqual({ intact: true });
  });

  it("is refused when it was appended before", async () => {
    await journal().append("run", small);
    await expect(journal().append("run", small)).rejects.toMatchObject({ name: "JournalGapError" });
  });

  it("of a run that nobody reserved is refused by the database", async () => {
    await expect(journal().append("unknown", small)).rejects.toThrow(/FOREIGN KEY/u);
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY])(
    "with %s in a reading is refused, and the next one is taken",
    async (bad) => {
      await expect(journal().append("run", [readingRecord(1, { volts: bad })])).rejects.toThrow(RangeError);
      await journal().append("run", [readingRecord(1, { volts: 500 })]);
      expect(await journal().lastSeq("run")).toBe(1);
    },
  );

  it("with a number that is not finite in an event is refused", async () => {
    const bad: RunEventOf<"output.off-proven"> = {
      ...{ seq: 1, atMs: 1, elapsedMs: 1, type: "output.off-proven" },
      data: { terminalVolts: Number.NaN },
    };
    await expect(journal().append("run", [bad])).rejects.toThrow(RangeError);
  });
});

describe("a reader beside a writer", () => {
  it("never sees a record without the one before it", async () => {
    const filler = Array.from({ length: 300 }, (_, index) =>
      index % 3 === 0 ? offProven(index + 1) : readingRecord(index + 1, {}),
    );
    const writing = appendInBatches(filler, 2);
    let isOver = false;
    void writing.then(() => (isOver = true));
    let looks = 0;
    while (!isOver) {
      const records = await journal().records("run", { afterSeq: 0, limit: 1000 });
      const merged = mergeColumns(await journal().columns("run"));
      for (const seen of [records, merged])
        expect(seen.map(({ seq }) => seq)).toEqual(seen.map((_, index) => index + 1));
      looks += 1;
    }
    await writing;
    expect(looks).toBeGreaterThan(1);
    expect(await journal().records("run", { afterSeq: 0, limit: 1000 })).toEqual(filler);
  });
});

function offProven(seq: number): RunEventOf<"output.off-proven"> {
  return { ...{ seq, atMs: seq, elapsedMs: seq, type: "output.off-proven" }, data: { terminalVolts: 0.4 } };
}

describe("a full disk", () => {
  // SQLite reports a database at its greatest page count as it reports a full disk.
  const limitPages = (pages: string) =>
    opened.database.write((transaction) =>
      opened.database.sequelize.query(`PRAGMA max_page_count = ${pages}`, { transaction }),
    );

  it("is told, loses nothing acknowledged, and the journal goes on when there is room again", async () => {
    const batch = (from: number) => Array.from({ length: 500 }, (_, index) => readingRecord(from + index, {}));
    await journal().append("run", batch(1));
    const [row] = await opened.rows<{ page_count: number }>("PRAGMA page_count");
    await limitPages(String(row!.page_count + 4));
    await expect(journal().append("run", batch(501))).rejects.toThrow(/SQLITE_FULL/u);
    expect(await journal().lastSeq("run")).toBe(500);
    expect(await journal().verifyChain("run")).toEqual({ intact: true });
    await limitPages("1000000");
    await journal().append("run", batch(501));
    expect(await journal().verifyChain("run")).toEqual({ intact: true });
    expect(await journal().lastSeq("run")).toBe(1000);
  });
});

describe("the database itself", () => {
  beforeEach(() => journal().append("run", small));

  it.each([
    ["UPDATE run_events SET data = '{}' WHERE seq = 1"],
    ["UPDATE readings SET ohms = 1 WHERE seq = 6"],
    ["UPDATE journal_batches SET hash = ''"],
    ["DELETE FROM run_events WHERE seq = 2"],
    ["DELETE FROM readings"],
    ["DELETE FROM journal_batches"],
    [
      "INSERT OR REPLACE INTO readings SELECT run_id, seq, at_ms, 0, point, attempt, phase, 1, 1, 1, '', '' FROM readings",
    ],
  ])("refuses %s", async (statement) => {
    await expect(opened.run(statement)).rejects.toMatchObject({
      original: { message: expect.stringContaining("the journal is only ever added to") as string },
    });
    expect(await journal().verifyChain("run")).toEqual({ intact: true });
  });

  it("refuses a second record of one number", async () => {
    await expect(opened.run("INSERT INTO run_events SELECT * FROM run_events WHERE seq = 1")).rejects.toThrow();
    await expect(opened.run("INSERT INTO readings SELECT * FROM readings WHERE seq = 6")).rejects.toThrow();
  });

  it("refuses to remove a run that has a journal", async () => {
    await expect(opened.run("DELETE FROM runs WHERE id = 'run'")).rejects.toThrow(/FOREIGN KEY/u);
  });
});
