import { Op } from "sequelize";
import { SessionRow } from "@/models";
import type { Database } from "./open-database";
import type { SessionsRepository } from "./repositories";

export function createSessionsRepository(database: Database): SessionsRepository {
  return {
    create: async (session) => {
      await database.write((transaction) => SessionRow.create({ ...session }, { transaction }));
    },
    find: async (idHash) => (await SessionRow.findByPk(idHash))?.get({ plain: true }) ?? null,
    touch: async (idHash, lastSeenAtMs) => {
      await database.write((transaction) => SessionRow.update({ lastSeenAtMs }, { where: { idHash }, transaction }));
    },
    remove: async (idHash) => {
      await database.write((transaction) => SessionRow.destroy({ where: { idHash }, transaction }));
    },
    removeAllOf: (personId) =>
      database.write(async (transaction) => {
        const rows = await SessionRow.findAll({ where: { personId }, transaction });
        await SessionRow.destroy({ where: { personId }, transaction });
        return rows.map((row) => row.idHash);
      }),
    removeExpired: async (nowMs) => {
      await database.write((transaction) =>
        SessionRow.destroy({ where: { expiresAtMs: { [Op.lte]: nowMs } }, transaction }),
      );
    },
  };
}
