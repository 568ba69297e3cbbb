import { readdirSync, rmSync } from "node:fs";
import path from "node:path";
import { createRepositories } from "@/lib/data/create-repositories";
import { DATABASE_FILE, openDatabase, type Database } from "@/lib/data/open-database";
import type { Repositories } from "@/lib/data/repositories";

const LAYING = "demo.laying";

export interface OpenedData {
  database: Database;
  repositories: Repositories;
}

/**
 * Opens the database of a data folder. One in which the laying of the demo laboratory was cut off is thrown away first:
 * nobody could reach it, so nothing of anybody's is in it.
 */
export async function openData(dataFolder: string): Promise<OpenedData> {
  const data = await open(dataFolder);
  if ((await data.repositories.siteSettings.get(LAYING)) !== "yes") return data;
  await data.database.close();
  for (const name of readdirSync(dataFolder)) {
    if (name.startsWith(DATABASE_FILE)) rmSync(path.join(dataFolder, name));
  }
  return open(dataFolder);
}

/** Marks the database as being laid while `lay` runs. */
export async function whileLaying({ siteSettings }: Repositories, lay: () => Promise<void>): Promise<void> {
  await siteSettings.set(LAYING, "yes");
  await lay();
  await siteSettings.set(LAYING, "no");
}

async function open(dataFolder: string): Promise<OpenedData> {
  const database = await openDatabase(dataFolder);
  return { database, repositories: createRepositories(database) };
}
