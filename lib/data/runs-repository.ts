import { Op, UniqueConstraintError, type Order, type WhereOptions } from "sequelize";
import { RunRow } from "@/models";
import { endedStatuses, runSummarySchema, type RunQuery, type RunSummary } from "@/lib/schemas/run";
import { DataError } from "./data-error";
import { nullOr } from "./null-or";
import type { Database } from "./open-database";
import type { RunsRepository } from "./repositories";

const sortColumns: Readonly<Record<RunQuery["sort"], string>> = {
  number: "number",
  unit: "assetNumber",
  recipe: "recipeName",
  bench: "benchName",
  started: "startedAtMs",
  outside: "outside",
};

export function createRunsRepository(database: Database): RunsRepository {
  return {
    reserve: (run) => reserve(database, run),
    forget: async (runId) => {
      await database.write((transaction) => RunRow.destroy({ where: { id: runId, summary: null }, transaction }));
    },
    updateSummary: async (summary) => {
      await database.write((transaction) =>
        RunRow.update(summaryColumns(summary), { where: { id: summary.id }, transaction }),
      );
    },
    get: async (runId) => nullOr(await RunRow.findByPk(runId), (row) => (row.summary === null ? null : toSummary(row))),
    query: async (query) => {
      const { rows, count } = await RunRow.findAndCountAll({
        where: whereOf(query),
        order: orderOf(query),
        limit: query.pageSize,
        offset: (query.page - 1) * query.pageSize,
      });
      return { rows: rows.map(toSummary), total: count };
    },
    activeOnBench: async (benchId) =>
      nullOr(await RunRow.findOne({ where: { benchId, isActive: true } }), (row) => ({ runId: row.id })),
    latestOfUnit: async (unitId) => {
      const where = { unitId, isActive: false, summary: { [Op.ne]: null } };
      return nullOr(await RunRow.findOne({ where, order: [["number", "DESC"]] }), toSummary);
    },
  };
}

async function reserve(
  database: Database,
  { runId, benchId, unitId }: { runId: string; benchId: string; unitId: string },
): Promise<number> {
  try {
    return await database.write(async (transaction) => {
      const highest = (await RunRow.max<number | null, RunRow>("number", { transaction })) ?? 0;
      const row = { id: runId, number: highest + 1, benchId, unitId, isActive: true };
      await RunRow.create({ ...emptyProjection, ...row }, { transaction });
      return row.number;
    });
  } catch (error) {
    if (!isBenchTaken(error)) throw error;
    throw new DataError("bench-taken", "Another run is on this bench already.", { cause: error });
  }
}

/** The index runs_one_active_per_bench speaks of its one column. */
function isBenchTaken(error: unknown): boolean {
  return error instanceof UniqueConstraintError && error.errors.some(({ path }) => path === "bench_id");
}

const emptyProjection = {
  status: null,
  startedAtMs: null,
  outside: null,
  unitName: null,
  assetNumber: null,
  recipeName: null,
  benchName: null,
  startedBy: null,
  summary: null,
};

function summaryColumns(summary: RunSummary) {
  return {
    isActive: !endedStatuses.includes(summary.status),
    status: summary.status,
    startedAtMs: summary.startedAtMs,
    outside: summary.counts.outside,
    unitName: summary.unitName,
    assetNumber: summary.assetNumber,
    recipeName: summary.recipeName,
    benchName: summary.benchName,
    startedBy: summary.startedBy,
    summary: JSON.stringify(summary),
  };
}

function whereOf({ search, status, bench, outside }: RunQuery): WhereOptions<RunRow> {
  const conditions: WhereOptions<RunRow>[] = [{ summary: { [Op.ne]: null } }];
  if (search) conditions.push(searchOf(search));
  if (status === "active") conditions.push({ isActive: true });
  if (status === "finished" || status === "stopped") conditions.push({ status });
  if (bench) conditions.push({ benchId: bench });
  if (outside === "some") conditions.push({ outside: { [Op.gt]: 0 } });
  if (outside === "none") conditions.push({ outside: 0 });
  return { [Op.and]: conditions };
}

function searchOf(search: string): WhereOptions<RunRow> {
  const pattern = `%${search.replace(/[%_\\]/gu, "")}%`;
  const texts = ["unitName", "assetNumber", "recipeName", "startedBy"].map((column) => ({
    [column]: { [Op.like]: pattern },
  }));
  const number = /^\d+$/u.test(search) ? [{ number: Number(search) }] : [];
  return { [Op.or]: [...texts, ...number] };
}

function orderOf({ sort, direction }: RunQuery): Order {
  const way = direction === "rising" ? "ASC" : "DESC";
  return [
    [sortColumns[sort], way],
    ["number", "DESC"],
  ];
}

function toSummary(row: RunRow): RunSummary {
  return runSummarySchema.parse(JSON.parse(row.summary ?? "null"));
}
