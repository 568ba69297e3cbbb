import { BenchRow, StandardRow, UnitModelRow, UnitRow } from "@/models";
import { benchSchema } from "@/lib/schemas/bench";
import { standardSchema, unitModelSchema, unitSchema, type Unit, type UnitModel } from "@/lib/schemas/instrument";
import type { Database } from "./open-database";
import type { BenchesRepository, StandardsRepository, UnitModelsRepository, UnitsRepository } from "./repositories";

export function createUnitModelsRepository(database: Database): UnitModelsRepository {
  return {
    list: listModels,
    create: async (model) => {
      const row = { id: model.id, document: JSON.stringify(unitModelSchema.parse(model)) };
      await database.write((transaction) => UnitModelRow.create(row, { transaction }));
    },
  };
}

async function listModels(): Promise<UnitModel[]> {
  return (await UnitModelRow.findAll({ order: [["id", "ASC"]] })).map((row) =>
    unitModelSchema.parse(JSON.parse(row.document)),
  );
}

export function createUnitsRepository(database: Database): UnitsRepository {
  const listAll = async (): Promise<Unit[]> => {
    const [rows, models] = await Promise.all([UnitRow.findAll({ order: [["assetNumber", "ASC"]] }), listModels()]);
    const modelById = new Map(models.map((model) => [model.id, model]));
    return rows.map((row) => toUnit(row, modelById.get(row.modelId)));
  };
  return {
    list: async (search) => {
      const wanted = search.trim().toLowerCase();
      const units = await listAll();
      return wanted === "" ? units : units.filter((unit) => unitWords(unit).includes(wanted));
    },
    get: async (id) => (await listAll()).find((unit) => unit.id === id) ?? null,
    create: async (unit) => {
      const { model, simulation, ...rest } = unitSchema.parse(unit);
      const row = { ...rest, modelId: model.id, simulation: simulation && JSON.stringify(simulation) };
      await database.write((transaction) => UnitRow.create(row, { transaction }));
    },
  };
}

function toUnit(row: UnitRow, model: UnitModel | undefined): Unit {
  const simulation: unknown = row.simulation === null ? null : JSON.parse(row.simulation);
  return unitSchema.parse({
    id: row.id,
    model,
    serialNumber: row.serialNumber,
    assetNumber: row.assetNumber,
    simulation,
  });
}

function unitWords({ assetNumber, serialNumber, model }: Unit): string {
  return `${assetNumber} ${serialNumber} ${model.maker} ${model.model}`.toLowerCase();
}

export function createStandardsRepository(database: Database): StandardsRepository {
  return {
    list: async () =>
      (await StandardRow.findAll({ order: [["id", "ASC"]] })).map((row) =>
        standardSchema.parse(JSON.parse(row.document)),
      ),
    create: async (standard) => {
      const row = { id: standard.id, document: JSON.stringify(standardSchema.parse(standard)) };
      await database.write((transaction) => StandardRow.create(row, { transaction }));
    },
  };
}

export function createBenchesRepository(database: Database): BenchesRepository {
  return {
    list: async () => {
      const rows = await BenchRow.findAll({ order: [["position", "ASC"]] });
      const standards = new Map(
        (await StandardRow.findAll()).map((row) => [row.id, JSON.parse(row.document) as unknown]),
      );
      return rows.map((row) =>
        benchSchema.parse({ ...JSON.parse(row.document), standard: standards.get(row.standardId) }),
      );
    },
    create: async (bench, position) => {
      const { standard, ...document } = benchSchema.parse(bench);
      const row = { id: bench.id, position, standardId: standard.id, document: JSON.stringify(document) };
      await database.write((transaction) => BenchRow.create(row, { transaction }));
    },
  };
}
