import path from "node:path";
import { QueryTypes, Sequelize } from "sequelize";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { createMigrator } from "@/lib/data/migrator";
import { createWriter } from "@/lib/data/writer";
import { initModels, models } from "@/models";
import { temporaryDataFolder } from "../support/server-process";

let sequelize: Sequelize;
let remove: () => void;

beforeEach(() => {
  const folder = temporaryDataFolder();
  remove = folder.remove;
  sequelize = new Sequelize({ dialect: "sqlite", storage: path.join(folder.dataFolder, "m.sqlite"), logging: false });
});

afterEach(async () => {
  await sequelize.close();
  remove();
});

const migrator = () => createMigrator(sequelize, createWriter(sequelize).write);

async function listObjects(): Promise<string[]> {
  const sql = "SELECT name FROM sqlite_master WHERE name NOT LIKE 'sqlite_%' ORDER BY name";
  return (await sequelize.query<{ name: string }>(sql, { type: QueryTypes.SELECT })).map(({ name }) => name);
}

async function listColumns(table: string): Promise<string[]> {
  const rows = await sequelize.query<{ name: string }>(`SELECT name FROM pragma_table_info('${table}')`, {
    type: QueryTypes.SELECT,
  });
  return rows.map(({ name }) => name).sort();
}

describe("the migrations", () => {
  it("go up and down on an empty database, and up again", async () => {
    await migrator().up();
    const objects = await listObjects();
    expect(objects).toContain("runs_one_active_per_bench");
    expect(await migrator().pending()).toEqual([]);
    await migrator().down({ to: 0 });
    expect(await listObjects()).toEqual(["migrations"]);
    expect(await migrator().executed()).toEqual([]);
    await migrator().up();
    expect(await listObjects()).toEqual(objects);
  });

  it("are run once", async () => {
    expect(await migrator().up()).toHaveLength(1);
    expect(await migrator().up()).toEqual([]);
  });

  it("leave nothing behind when one fails half-way", async () => {
    await sequelize.query("CREATE TABLE runs (id TEXT)");
    await expect(migrator().up()).rejects.toThrow(/runs already exists/u);
    expect(await listObjects()).toEqual(["migrations", "runs"]);
    expect(await migrator().executed()).toEqual([]);
  });
});

describe("a migrated database", () => {
  it("has the tables of the models and no other", async () => {
    await migrator().up();
    initModels(sequelize);
    const tables = models.map((model) => model.tableName);
    expect(models.length).toBeGreaterThan(10);
    const sql = "SELECT name FROM sqlite_master WHERE type = 'table' AND name NOT LIKE 'sqlite_%'";
    const found = await sequelize.query<{ name: string }>(sql, { type: QueryTypes.SELECT });
    expect(found.map(({ name }) => name).sort()).toEqual([...tables, "migrations"].sort());
  });

  it("has the columns that each model declares and no other", async () => {
    await migrator().up();
    initModels(sequelize);
    for (const model of models) {
      const declared = Object.values(model.rawAttributes).map(({ field }) => field);
      expect(await listColumns(model.tableName), model.tableName).toEqual(declared.sort());
    }
  });

  it("is told each model by a name of its own, so that a minified class changes nothing", () => {
    initModels(sequelize);
    expect(models.map((model) => model.name).filter((name) => name.endsWith("Row"))).toEqual([]);
    expect(new Set(models.map((model) => model.name)).size).toBe(models.length);
  });
});
