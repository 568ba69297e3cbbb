import { existsSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import sqlite3 from "sqlite3";
import { DataError } from "./data-error";

const LOCK_NAME = "in-use.sqlite";
const OWNER_NAME = "in-use.pid";

/**
 * Keeps a data folder for this process until the returned function is called. The mark is a lock that the system holds
 * on an open file, so it goes when the process does, however it ends, and two starts at one moment can't both have it.
 * Throws DataError `database-in-use` while another one lives.
 */
export async function takeFolder(dataFolder: string): Promise<() => Promise<void>> {
  const lock = await openLock(path.join(dataFolder, LOCK_NAME));
  try {
    await promised((done) => lock.exec("BEGIN EXCLUSIVE", done));
  } catch (cause) {
    await promised((done) => lock.close(done));
    throw inUse(dataFolder, cause);
  }
  writeFileSync(path.join(dataFolder, OWNER_NAME), String(process.pid));
  return () => promised((done) => lock.close(done));
}

function openLock(file: string): Promise<sqlite3.Database> {
  return new Promise((resolve, reject) => {
    const lock = new sqlite3.Database(file, (error) => (error ? reject(error) : resolve(lock)));
    lock.configure("busyTimeout", 0);
  });
}

function inUse(dataFolder: string, cause: unknown): Error {
  if ((cause as { code?: string }).code !== "SQLITE_BUSY") return cause as Error;
  const file = path.join(dataFolder, OWNER_NAME);
  const owner = existsSync(file) ? ` (process ${readFileSync(file, "utf8")})` : "";
  const message = `Another Stepwell${owner} uses the data folder ${dataFolder}. Stop it first.`;
  return new DataError("database-in-use", message, { cause });
}

function promised(act: (done: (error: Error | null) => void) => void): Promise<void> {
  return new Promise((resolve, reject) => act((error) => (error ? reject(error) : resolve())));
}
