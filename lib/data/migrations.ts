import type { QueryInterface } from "sequelize";
import * as firstTables from "@/migrations/001-first-tables";

interface Migration {
  name: string;
  up(queryInterface: QueryInterface): Promise<void>;
  down(queryInterface: QueryInterface): Promise<void>;
}

/** Every migration in order. A released one is never edited. */
export const migrations: readonly Migration[] = [{ name: "001-first-tables", ...firstTables }];
