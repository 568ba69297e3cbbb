import { QueryTypes, type Sequelize } from "sequelize";
import { DataError } from "./data-error";

/** Earlier versions can damage a write-ahead log that two connections write. */
const LEAST_SQLITE = "3.51.3";

/** Throws DataError when SQLite is too old or the file is damaged. */
export async function checkDatabase(sequelize: Sequelize): Promise<void> {
  try {
    requireNewEnough(await valueOf(sequelize, "SELECT sqlite_version()"));
    const finding = await valueOf(sequelize, "PRAGMA quick_check(1)");
    if (finding !== "ok") throw damaged(finding);
  } catch (error) {
    if (/SQLITE_(NOTADB|CORRUPT)/u.test(String(error))) throw damaged((error as Error).message, error);
    throw error;
  }
}

/** Throws DataError for a version before 3.51.3. */
export function requireNewEnough(version: string): void {
  if (version.localeCompare(LEAST_SQLITE, "en", { numeric: true }) >= 0) return;
  throw new DataError(
    "database-too-old",
    `SQLite ${version} is too old; ${LEAST_SQLITE} or newer is needed. Install the packages again.`,
  );
}

/** The one value of a one-line answer. */
async function valueOf(sequelize: Sequelize, sql: string): Promise<string> {
  const [row] = await sequelize.query<Record<string, string>>(sql, { type: QueryTypes.SELECT });
  return Object.values(row ?? {})[0] ?? "no answer";
}

function damaged(finding: string, cause?: unknown): DataError {
  const message = `The database is damaged (${finding}). Restore the latest backup of the data folder.`;
  return new DataError("database-damaged", message, { cause });
}
