import { CommandSeenRow, SiteSettingRow } from "@/models";
import type { Database } from "./open-database";
import type { CommandsSeenRepository, SiteSettingsRepository } from "./repositories";

export function createSiteSettingsRepository(database: Database): SiteSettingsRepository {
  return {
    get: async (key) => (await SiteSettingRow.findByPk(key))?.value ?? null,
    set: async (key, value) => {
      await database.write((transaction) => SiteSettingRow.upsert({ key, value }, { transaction }));
    },
  };
}

export function createCommandsSeenRepository(database: Database): CommandsSeenRepository {
  return {
    claim: (id, outcome) =>
      database.write(async (transaction) => {
        if (await CommandSeenRow.findByPk(id, { transaction })) return false;
        await CommandSeenRow.create({ id, outcome, atMs: Date.now() }, { transaction });
        return true;
      }),
    find: async (id) => (await CommandSeenRow.findByPk(id))?.outcome ?? null,
  };
}
