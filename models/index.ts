import type { Sequelize } from "sequelize";
import { initPersonRow, PersonRow } from "./person";
import { initSessionRow, SessionRow } from "./session";
import { initUnitModelRow, UnitModelRow } from "./unit-model";
import { initUnitRow, UnitRow } from "./unit";
import { initStandardRow, StandardRow } from "./standard";
import { initBenchRow, BenchRow } from "./bench";
import { initRecipeVersionRow, RecipeVersionRow } from "./recipe-version";
import { initRunRow, RunRow } from "./run";
import { initRunEventRow, RunEventRow } from "./run-event";
import { initReadingRow, ReadingRow } from "./reading";
import { initJournalBatchRow, JournalBatchRow } from "./journal-batch";
import { initSiteSettingRow, SiteSettingRow } from "./site-setting";
import { initCommandSeenRow, CommandSeenRow } from "./command-seen";

export {
  PersonRow,
  SessionRow,
  UnitModelRow,
  UnitRow,
  StandardRow,
  BenchRow,
  RecipeVersionRow,
  RunRow,
  RunEventRow,
  ReadingRow,
  JournalBatchRow,
  SiteSettingRow,
  CommandSeenRow,
};

/** Every model with its table, for the test that holds them against the migrations. */
export const models = [
  PersonRow,
  SessionRow,
  UnitModelRow,
  UnitRow,
  StandardRow,
  BenchRow,
  RecipeVersionRow,
  RunRow,
  RunEventRow,
  ReadingRow,
  JournalBatchRow,
  SiteSettingRow,
  CommandSeenRow,
] as const;

/** Binds all models to one database. */
export function initModels(sequelize: Sequelize): void {
  initPersonRow(sequelize);
  initSessionRow(sequelize);
  initUnitModelRow(sequelize);
  initUnitRow(sequelize);
  initStandardRow(sequelize);
  initBenchRow(sequelize);
  initRecipeVersionRow(sequelize);
  initRunRow(sequelize);
  initRunEventRow(sequelize);
  initReadingRow(sequelize);
  initJournalBatchRow(sequelize);
  initSiteSettingRow(sequelize);
  initCommandSeenRow(sequelize);
}
