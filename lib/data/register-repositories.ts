import { BenchRow, StandardRow, UnitModelRow, UnitRow } from "@/models";
import { benchSchema } from "@/lib/schemas/bench";
import {
  standardSchema,
  testerPhysicsSchema,
  unitModelSchema,
  unitSchema,
  type Unit,
  type UnitModel,
} from "@/lib/schemas/instrument";
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
  return (await UnitModelRow.findAll({ order: [["id", "ASC"]] })).map(toModel);
}

function toModel(row: UnitModelRow): UnitModel {
  return unitModelSchema.parse(JSON.parse(row.document));
}

export function createUnitsRepository(database: Database): UnitsRepository {
  return {
    list: async (search) => {
      const wanted = search.trim().toLowerCase();
      const [rows, models] = await Promise.all([UnitRow.findAll({ order: [["assetNumber", "ASC"]] }), listModels()]);
      const modelById = new Map(models.map((model) => [model.id, model]));
      const units = rows.map((row) => toUnit(row, modelById.get(row.modelId)!));
      return units.filter((unit) => unitWords(unit).includes(wanted));
    },
    get: async (id) => {
      const row = await UnitRow.findByPk(id);
      if (!row) return null;
      const model = await UnitModelRow.findByPk(row.modelId, { rejectOnEmpty: true });
      return toUnit(row, toModel(model));
    },
    create: async (unit) => {
      const { model, simulation, ...rest } = unitSchema.parse(unit);
      const row = { ...rest, modelId: model.id, simulation: simulation && JSON.stringify(simulation) };
      await database.write((transaction) => UnitRow.create(row, { transaction }));
    },
  };
}

function toUnit({ id, serialNumber, assetNumber, simulation }: UnitRow, model: UnitModel): Unit {
  const physics = simulation === null ? null : testerPhysicsSchema.parse(JSON.parse(simulation));
  return { id, model, serialNumber, assetNumber, simulation: physics };
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
