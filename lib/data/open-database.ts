import { mkdirSync } from "node:fs";
import path from "node:path";
import { Sequelize } from "sequelize";
import { initModels } from "@/models";
import { checkDatabase } from "./check-database";
import { setPragmasOnEveryConnection } from "./connections";
import { takeFolder } from "./folder-lock";
import { createMigrator } from "./migrator";
import { createWriter, type Writer } from "./writer";

/** Name of the database in a data folder; its log files begin with it. */
export const DATABASE_FILE = "stepwell.sqlite";

export interface Database {
  sequelize: Sequelize;
  /** The only way to write: one transaction after the other. Every statement inside takes `transaction`. */
  write: Writer["write"];
  close(): Promise<void>;
}

/**
 * Opens (and migrates) the database of a data folder.
 * Throws DataError when another process has it, SQLite is too old or the file is damaged.
 */
export async function openDatabase(dataFolder: string): Promise<Database> {
  mkdirSync(dataFolder, { recursive: true, mode: 0o700 });
  const release = await takeFolder(dataFolder);
  const sequelize = new Sequelize({ dialect: "sqlite", storage: path.join(dataFolder, DATABASE_FILE), logging: false });
  setPragmasOnEveryConnection(sequelize);
  const writer = createWriter(sequelize);
  const close = async () => {
    await writer.idle();
    await sequelize.close();
    await release();
  };
  try {
    await checkDatabase(sequelize);
    await createMigrator(sequelize, writer.write).up();
    initModels(sequelize);
    return { sequelize, write: writer.write, close };
  } catch (error) {
    await close();
    throw error;
  }
}
