import { closeSync, existsSync, openSync, readFileSync, rmSync, writeSync } from "node:fs";
import path from "node:path";
import { DataError } from "./data-error";

const LOCK_NAME = "in-use";

/**
 * Marks a data folder as used by this process; the returned function gives it back. A mark that a killed process left
 * is taken over. Throws DataError `database-in-use` while another process lives.
 */
export function takeFolder(dataFolder: string): () => void {
  const file = path.join(dataFolder, LOCK_NAME);
  const owner = existsSync(file) ? Number(readFileSync(file, "utf8").split(" ")[0]) : null;
  if (owner !== null && owner !== process.pid && isAlive(owner, readFileSync(file, "utf8"))) {
    throw new DataError(
      "database-in-use",
      `Another Stepwell (process ${owner}) uses the data folder ${dataFolder}. Stop it first.`,
    );
  }
  rmSync(file, { force: true });
  const handle = openSync(file, "wx");
  writeSync(handle, `${process.pid} ${startTicks(process.pid)}`);
  closeSync(handle);
  return () => rmSync(file, { force: true });
}

/** Alive, and the same process as then: numbers are given again, start times are not. */
function isAlive(pid: number, mark: string): boolean {
  try {
    process.kill(pid, 0);
  } catch {
    return false;
  }
  const ticks = mark.split(" ")[1];
  return !ticks || ticks === startTicks(pid);
}

/** Start time of a process in clock ticks since boot; empty where the system does not tell. */
function startTicks(pid: number): string {
  const file = `/proc/${pid}/stat`;
  if (!existsSync(file)) return "";
  return readFileSync(file, "utf8").split(") ").at(-1)!.split(" ")[19] ?? "";
}
