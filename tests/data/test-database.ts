import { createRepositories } from "@/lib/data/create-repositories";
import { layDemoRegister } from "@/lib/data/demo/lay-demo-register";
import { openDatabase, type Database } from "@/lib/data/open-database";
import type { Repositories } from "@/lib/data/repositories";
import { QueryTypes } from "sequelize";
import { temporaryDataFolder } from "../support/server-process";

/** 1 December 2026, 08:00 UTC. */
export const NOW_MS = Date.UTC(2026, 11, 1, 8);

export interface TestDatabase {
  dataFolder: string;
  database: Database;
  repositories: Repositories;
  /** Rows of a plain statement. */
  rows<T extends object>(sql: string): Promise<T[]>;
  /** Runs a plain statement as a write. */
  run(sql: string): Promise<void>;
  close(): Promise<void>;
}

/** A database in a folder of its own. */
export async function openTestDatabase(): Promise<TestDatabase> {
  const { dataFolder, remove } = temporaryDataFolder();
  const database = await openDatabase(dataFolder);
  return {
    dataFolder,
    database,
    repositories: createRepositories(database),
    rows: (sql) => database.sequelize.query(sql, { type: QueryTypes.SELECT }),
    run: async (sql) => {
      await database.write((transaction) => database.sequelize.query(sql, { transaction }));
    },
    close: async () => {
      await database.close();
      remove();
    },
  };
}

/** The same with the demo laboratory's register laid. */
export async function openTestRegister(): Promise<TestDatabase> {
  const opened = await openTestDatabase();
  const { repositories } = opened;
  await layDemoRegister({ repositories, hashPassword: async (password) => `hash of ${password}`, nowMs: NOW_MS });
  return opened;
}

/** A run that may have a journal, on the bench given. */
export async function reserveRun({ repositories }: TestDatabase, runId: string, benchId = "north"): Promise<number> {
  return repositories.runs.reserve({ runId, benchId, unitId: "tw-0412" });
}
