import { mkdirSync } from "node:fs";
import path from "node:path";
import PQueue from "p-queue";
import { QueryTypes, Sequelize, Transaction } from "sequelize";
import { Umzug, SequelizeStorage } from "umzug";
import { initModels } from "@/models";
import { DataError } from "./data-error";
import { takeFolder } from "./folder-lock";
import { migrations } from "./migrations";

const FILE_NAME = "stepwell.sqlite";
/** Earlier versions can damage a write-ahead log that two connections write. */
const LEAST_SQLITE = [3, 51, 3] as const;

const PRAGMAS = [
  "PRAGMA journal_mode = WAL",
  "PRAGMA synchronous = FULL",
  "PRAGMA foreign_keys = ON",
  "PRAGMA busy_timeout = 2000",
  "PRAGMA trusted_schema = OFF",
];

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
  try {
    setPragmasOnEveryConnection(sequelize);
    await checkVersion(sequelize);
    await checkFile(sequelize);
    await migrator(sequelize).up();
    initModels(sequelize);
  } catch (error) {
    await sequelize.close();
    release();
    throw error;
  }
  const writer = new PQueue({ concurrency: 1 });
  return {
    sequelize,
    write: (act) => writer.add(() => sequelize.transaction({ type: Transaction.TYPES.IMMEDIATE }, act)),
    close: async () => {
      await writer.onIdle();
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

interface Connection {
  run(sql: string, done: (error: Error | null) => void): void;
}

/** Sequelize opens a connection for each transaction and runs no hook for it, so its source of connections is wrapped. */
export function setPragmasOnEveryConnection(sequelize: Sequelize): void {
  const manager = sequelize.connectionManager as unknown as { getConnection(options?: object): Promise<Connection> };
  const getConnection = manager.getConnection.bind(manager);
  const prepared = new WeakMap<Connection, Promise<void>>();
  manager.getConnection = async (options) => {
    const connection = await getConnection(options);
    let ready = prepared.get(connection);
    if (!ready) prepared.set(connection, (ready = runAll(connection, PRAGMAS)));
    await ready;
    return connection;
  };
}

async function runAll(connection: Connection, statements: readonly string[]): Promise<void> {
  for (const statement of statements) {
    await new Promise<void>((resolve, reject) => connection.run(statement, (error) => (error ? reject(error) : resolve())));
  }
}

async function checkVersion(sequelize: Sequelize): Promise<void> {
  const [row] = await sequelize.query<{ version: string }>("SELECT sqlite_version() AS version", { type: QueryTypes.SELECT });
  const parts = row!.version.split(".").map(Number);
  const difference = LEAST_SQLITE.map((least, index) => (parts[index] ?? 0) - least).find((value) => value !== 0) ?? 0;
  if (difference >= 0) return;
  throw new DataError("database-too-old", `SQLite ${row!.version} is too old; ${LEAST_SQLITE.join(".")} or newer is needed. Install the packages again.`);
}

async function checkFile(sequelize: Sequelize): Promise<void> {
  const [row] = await sequelize.query<{ quick_check: string }>("PRAGMA quick_check", { type: QueryTypes.SELECT });
  if (row?.quick_check === "ok") return;
  throw new DataError("database-damaged", `The database is damaged (${row?.quick_check}). Restore the latest backup of the data folder.`);
}
