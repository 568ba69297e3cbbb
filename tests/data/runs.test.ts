import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { runQuerySchema, type RunQuery, type RunSummary } from "@/lib/schemas/run";
import { NOW_MS, openTestRegister, reserveRun, type TestDatabase } from "./test-database";

let opened: TestDatabase;

beforeEach(async () => {
  opened = await openTestRegister();
});

afterEach(() => opened.close());

const runs = () => opened.repositories.runs;

const noCounts = { inside: 0, doubtful: 0, outside: 0, unsettled: 0, notStated: 0, skipped: 0, open: 0, total: 0 };

function summaryOf(id: string, number: number, changes: Partial<RunSummary> = {}): RunSummary {
  return {
    ...{ id, number, status: "finished", benchId: "north", benchName: "North bench", unitId: "tw-0412" },
    ...{
      unitName: "Pellham IR-10",
      assetNumber: "TW-0412",
      recipeId: "r",
      recipeName: "Quick check",
      recipeVersion: 1,
    },
    ...{ condition: "as-found", startedBy: "Ines Marlow", startedAtMs: NOW_MS + number, endedAtMs: NOW_MS + 9 },
    ...{ counts: { ...noCounts, inside: 9, total: 9 }, stairs: [{ testVolts: 250, steps: ["inside", "outside"] }] },
    ...changes,
  };
}

/** Lays a run that is over. */
async function layRun(id: string, changes: Partial<RunSummary> = {}): Promise<RunSummary> {
  const number = await reserveRun(opened, id, changes.benchId ?? "north");
  const summary = summaryOf(id, number, changes);
  await runs().updateSummary(summary);
  return summary;
}

describe("a run on a bench", () => {
  it("takes the next number", async () => {
    expect(await reserveRun(opened, "a", "north")).toBe(1);
    expect(await reserveRun(opened, "b", "window")).toBe(2);
    await runs().forget("b");
    expect(await reserveRun(opened, "c", "window")).toBe(2);
  });

  it("is refused by the database while another one is active there", async () => {
    await reserveRun(opened, "a", "north");
    await expect(reserveRun(opened, "b", "north")).rejects.toMatchObject({ name: "DataError", code: "bench-taken" });
    const copy =
      "INSERT INTO runs SELECT 'b', 99, bench_id, unit_id, 1, NULL, 1, 0, '', '', '', '', '', NULL FROM runs";
    await expect(opened.run(copy)).rejects.toMatchObject({ name: "SequelizeUniqueConstraintError" });
  });

  it("is accepted once of fifty starts at one moment", async () => {
    const starts = Array.from({ length: 50 }, (_, index) => reserveRun(opened, `run ${index}`, "north"));
    const outcomes = await Promise.allSettled(starts);
    expect(outcomes.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    const refused = outcomes.flatMap((outcome) => (outcome.status === "rejected" ? [outcome.reason.code] : []));
    expect(new Set(refused)).toEqual(new Set(["bench-taken"]));
  });

  it.each(["held", "faulted", "interrupted"] as const)("keeps the bench while it is %s", async (status) => {
    await layRun("a", { status });
    expect(await runs().activeOnBench("north")).toEqual({ runId: "a" });
    await expect(reserveRun(opened, "b", "north")).rejects.toMatchObject({ code: "bench-taken" });
  });

  it.each(["finished", "stopped"] as const)("frees the bench when it is %s", async (status) => {
    await layRun("a", { status });
    expect(await runs().activeOnBench("north")).toBeNull();
    expect(await reserveRun(opened, "b", "north")).toBe(2);
  });

  it("needs a bench and a unit of the register", async () => {
    await expect(reserveRun(opened, "a", "nowhere")).rejects.toThrow(/FOREIGN KEY/u);
    const unknownUnit = { runId: "a", benchId: "north", unitId: "tw-9999" };
    await expect(runs().reserve(unknownUnit)).rejects.toThrow(/FOREIGN KEY/u);
  });

  it("is not forgotten once it has a summary", async () => {
    const summary = await layRun("a");
    await runs().forget("a");
    expect(await runs().get("a")).toEqual(summary);
  });
});

describe("the list of runs", () => {
  const query = (changes: Partial<RunQuery>) => runs().query(runQuerySchema.parse(changes));
  const idsOf = async (changes: Partial<RunQuery>) => (await query(changes)).rows.map(({ id }) => id);

  beforeEach(async () => {
    await layRun("a", { startedBy: "Tomas Reyl" });
    await layRun("b", { counts: { ...noCounts, outside: 2 }, assetNumber: "TW-0377", unitName: "Aldgrove M5" });
    await layRun("c", { status: "stopped", recipeName: "Full matrix", benchId: "window", benchName: "Window bench" });
    await layRun("d", { status: "held", benchId: "window", benchName: "Window bench" });
    // Reserved, without a record yet.
    await reserveRun(opened, "e", "north");
  });

  it("has the newest first and leaves out a run without a record", async () => {
    expect(await query({})).toMatchObject({ total: 4, rows: [{ id: "d" }, { id: "c" }, { id: "b" }, { id: "a" }] });
    expect(await runs().get("e")).toBeNull();
  });

  it.each<[Partial<RunQuery>, string[]]>([
    [{ status: "active" }, ["d"]],
    [{ status: "finished" }, ["b", "a"]],
    [{ status: "stopped" }, ["c"]],
    [{ bench: "window" }, ["d", "c"]],
    [{ outside: "some" }, ["b"]],
    [{ outside: "none" }, ["d", "c", "a"]],
    [{ search: "aldgrove" }, ["b"]],
    [{ search: "0377" }, ["b"]],
    [{ search: "full" }, ["c"]],
    [{ search: "tomas" }, ["a"]],
    [{ search: "3" }, ["c", "b"]],
    [{ search: "%" }, ["d", "c", "b", "a"]],
    [{ search: "no such thing" }, []],
    [{ search: "tw-04", status: "finished" }, ["a"]],
  ])("is narrowed by %j", async (changes, ids) => {
    expect(await idsOf(changes)).toEqual(ids);
    expect((await query(changes)).total).toBe(ids.length);
  });

  it.each<[Partial<RunQuery>, string[]]>([
    [{ sort: "number", direction: "rising" }, ["a", "b", "c", "d"]],
    [{ sort: "unit", direction: "rising" }, ["b", "d", "c", "a"]],
    [{ sort: "recipe", direction: "rising" }, ["c", "d", "b", "a"]],
    [{ sort: "bench", direction: "falling" }, ["d", "c", "b", "a"]],
    [{ sort: "started", direction: "rising" }, ["a", "b", "c", "d"]],
    [{ sort: "outside", direction: "falling" }, ["b", "d", "c", "a"]],
  ])("is sorted by %j, the newest first among equals", async (changes, ids) => {
    expect(await idsOf(changes)).toEqual(ids);
  });

  it("comes a page at a time", async () => {
    for (let index = 0; index < 8; index += 1) await layRun(`x${index}`, { benchId: "cold-room" });
    expect(await query({ page: 3, pageSize: 5 })).toMatchObject({ total: 12, rows: [{ id: "b" }, { id: "a" }] });
    expect((await query({ page: 9, pageSize: 5 })).rows).toEqual([]);
  });

  it("knows the latest run of a unit that is over", async () => {
    expect(await runs().latestOfUnit("tw-0412")).toMatchObject({ id: "c" });
    expect(await runs().latestOfUnit("tw-0377")).toBeNull();
  });
});
