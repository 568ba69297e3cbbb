import { PersonRow } from "@/models";
import { personSchema, roleSchema, type Person } from "@/lib/schemas/person";
import { nullOr } from "./null-or";
import type { Database } from "./open-database";
import type { PeopleRepository } from "./repositories";

export function createPeopleRepository(database: Database): PeopleRepository {
  return {
    list: async () => (await PersonRow.findAll({ order: [["name", "ASC"]] })).map(toPerson),
    count: () => PersonRow.count(),
    get: async (id) => nullOr(await PersonRow.findByPk(id), toPerson),
    findByEmail: async (email) =>
      nullOr(await PersonRow.findOne({ where: { email: email.toLowerCase() } }), (row) => ({
        person: toPerson(row),
        passwordHash: row.passwordHash,
      })),
    create: async (draft, passwordHash) => {
      const person = personSchema.parse({ ...draft, id: crypto.randomUUID(), email: draft.email.toLowerCase() });
      const row = { ...person, roles: JSON.stringify(person.roles), passwordHash, createdAtMs: Date.now() };
      await database.write((transaction) => PersonRow.create(row, { transaction }));
      return person;
    },
    setActive: async (id, active) => {
      await database.write((transaction) => PersonRow.update({ active }, { where: { id }, transaction }));
    },
  };
}

function toPerson({ id, email, name, roles, active }: PersonRow): Person {
  return { id, email, name, roles: roleSchema.array().parse(JSON.parse(roles)), active };
}
