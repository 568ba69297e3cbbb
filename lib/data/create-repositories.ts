import { createJournalRepository } from "./journal-repository";
import type { Database } from "./open-database";
import { createPeopleRepository } from "./people-repository";
import { createRecipesRepository } from "./recipes-repository";
import {
  createBenchesRepository,
  createStandardsRepository,
  createUnitModelsRepository,
  createUnitsRepository,
} from "./register-repositories";
import type { Repositories } from "./repositories";
import { createRunsRepository } from "./runs-repository";
import { createSessionsRepository } from "./sessions-repository";
import { createCommandsSeenRepository, createSiteSettingsRepository } from "./site-repositories";

/** All repositories on one opened database. */
export function createRepositories(database: Database): Repositories {
  return {
    journal: createJournalRepository(database),
    people: createPeopleRepository(database),
    sessions: createSessionsRepository(database),
    units: createUnitsRepository(database),
    unitModels: createUnitModelsRepository(database),
    standards: createStandardsRepository(database),
    benches: createBenchesRepository(database),
    recipes: createRecipesRepository(database),
    runs: createRunsRepository(database),
    siteSettings: createSiteSettingsRepository(database),
    commandsSeen: createCommandsSeenRepository(database),
  };
}
