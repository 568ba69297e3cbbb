import { QueryTypes, type QueryInterface, type Sequelize, type Transaction } from "sequelize";
import { Umzug } from "umzug";
import * as firstTables from "@/migrations/001-first-tables";
import type { Writer } from "./writer";

interface Migration {
  name: string;
  up(queryInterface: QueryInterface, transaction: Transaction): Promise<void>;
  down(queryInterface: QueryInterface, transaction: Transaction): Promise<void>;
}

/** Every migration in order. A released one is never edited. */
const migrations: readonly Migration[] = [{ name: "001-first-tables", ...firstTables }];

/** Migrations of one database. Each is one transaction with its entry in the list, so a kill leaves it done or not begun. */
export function createMigrator(sequelize: Sequelize, write: Writer["write"]) {
  const queryInterface = sequelize.getQueryInterface();
  return new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({
      name,
      up: () =>
        write(async (transaction) => {
          await up(queryInterface, transaction);
          await sequelize.query("INSERT INTO migrations (name) VALUES ($1)", { bind: [name], transaction });
        }),
      down: () =>
        write(async (transaction) => {
          await down(queryInterface, transaction);
          await sequelize.query("DELETE FROM migrations WHERE name = $1", { bind: [name], transaction });
        }),
    })),
    storage: {
      executed: () => listExecuted(sequelize, write),
      logMigration: writtenWithTheMigration,
      unlogMigration: writtenWithTheMigration,
    },
    logger: undefined,
  });
}

async function listExecuted(sequelize: Sequelize, write: Writer["write"]): Promise<string[]> {
  await write((transaction) =>
    sequelize.query("CREATE TABLE IF NOT EXISTS migrations (name TEXT PRIMARY KEY NOT NULL)", { transaction }),
  );
  const rows = await sequelize.query<{ name: string }>("SELECT name FROM migrations ORDER BY name", {
    type: QueryTypes.SELECT,
  });
  return rows.map(({ name }) => name);
}

async function writtenWithTheMigration(): Promise<void> {}
