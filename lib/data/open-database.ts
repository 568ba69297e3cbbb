import { mkdirSync } from "node:fs";
import path from "node:path";
import { QueryTypes, Sequelize, type Transaction } from "sequelize";
import { Umzug, SequelizeStorage } from "umzug";
import { initModels } from "@/models";
import { setPragmasOnEveryConnection } from "./connections";
import { DataError } from "./data-error";
import { takeFolder } from "./folder-lock";
import { migrations } from "./migrations";
import { createWriter } from "./writer";

const FILE_NAME = "stepwell.sqlite";
/** Earlier versions can damage a write-ahead log that two connections write. */
const LEAST_SQLITE = [3, 51, 3] as const;

export interface Database {
  sequelize: Sequelize;
  /** The only way to write: one transaction after the other, begun IMMEDIATE. Every statement inside takes `transaction`. */
  write<T>(act: (transaction: Transaction) => Promise<T>): Promise<T>;
  close(): Promise<void>;
}

/**
 * Opens (and migrates) the database of a data folder.
 * Throws DataError when another process has it, SQLite is too old or the file is damaged.
 */
export async function openDatabase(dataFolder: string): Promise<Database> {
  mkdirSync(dataFolder, { recursive: true });
  const release = takeFolder(dataFolder);
  const sequelize = new Sequelize({ dialect: "sqlite", storage: path.join(dataFolder, FILE_NAME), logging: false });
  setPragmasOnEveryConnection(sequelize);
  try {
    await checkVersion(sequelize);
    await checkFile(sequelize);
    await migrator(sequelize).up();
    initModels(sequelize);
  } catch (error) {
    await sequelize.close();
    release();
    throw error;
  }
  const writer = createWriter(sequelize);
  return {
    sequelize,
    write: writer.write,
    close: async () => {
      await writer.idle();
      await sequelize.close();
      release();
    },
  };
}

/** Migrations of one database, up and down. */
export function migrator(sequelize: Sequelize) {
  return new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({
      name,
      up: () => up(sequelize.getQueryInterface()),
      down: () => down(sequelize.getQueryInterface()),
    })),
    storage: new SequelizeStorage({ sequelize, modelName: "MigrationRow", tableName: "migrations" }),
    logger: undefined,
  });
}

async function checkVersion(sequelize: Sequelize): Promise<void> {
  const [row] = await sequelize.query<{ version: string }>("SELECT sqlite_version() AS version", {
    type: QueryTypes.SELECT,
  });
  const parts = row!.version.split(".").map(Number);
  const difference = LEAST_SQLITE.map((least, index) => (parts[index] ?? 0) - least).find((value) => value !== 0) ?? 0;
  if (difference >= 0) return;
  throw new DataError(
    "database-too-old",
    `SQLite ${row!.version} is too old; ${LEAST_SQLITE.join(".")} or newer is needed. Install the packages again.`,
  );
}

async function checkFile(sequelize: Sequelize): Promise<void> {
  const [row] = await sequelize.query<{ quick_check: string }>("PRAGMA quick_check", { type: QueryTypes.SELECT });
  if (row?.quick_check === "ok") return;
  throw new DataError(
    "database-damaged",
    `The database is damaged (${row?.quick_check}). Restore the latest backup of the data folder.`,
  );
}
