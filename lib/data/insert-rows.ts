import type { Transaction } from "sequelize";
import type { StoredField } from "@/lib/journal/canonical-record";
import type { Connection } from "./connections";

/** SQLite takes at most 32,766 bound values a statement. */
const ROWS_PER_STATEMENT = 1000;

/**
 * Inserts rows of one width, many a statement, on the connection of a transaction. Values are bound, never written into
 * the statement: SQLite would read a number's text back with a rounding of its own. Sequelize's own way to bind takes
 * longer with the square of the number of values.
 */
export async function insertRows(
  transaction: Transaction,
  table: string,
  columns: readonly string[],
  rows: readonly (readonly StoredField[])[],
): Promise<void> {
  const { connection } = transaction as unknown as { connection: Connection };
  const places = `(${columns.map(() => "?").join(",")})`;
  for (let from = 0; from < rows.length; from += ROWS_PER_STATEMENT) {
    const part = rows.slice(from, from + ROWS_PER_STATEMENT);
    const sql = `INSERT INTO ${table} (${columns.join(",")}) VALUES ${Array(part.length).fill(places).join(",")}`;
    await new Promise<void>((resolve, reject) =>
      connection.run(sql, part.flat(), (error) => (error ? reject(error) : resolve())),
    );
  }
}
