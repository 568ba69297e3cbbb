import type { Person, Role } from "@/lib/schemas/person";

const everyone: readonly Role[] = ["technician", "engineer", "supervisor", "reviewer", "administrator"];

/** The one table of who may do what; pages, route handlers and the socket ask it. */
export const permissions = {
  "bench.watch": everyone,
  "run.watch": everyone,
  "run.start": ["technician", "engineer"],
  "run.hold": ["technician", "engineer", "supervisor"],
  "run.resume": ["technician", "engineer"],
  "run.skip": ["technician", "engineer"],
  "run.stop": ["technician", "engineer", "supervisor"],
  "run.decide": ["reviewer"],
  "recipe.read": everyone,
  "recipe.write": ["engineer"],
  "recipe.release": ["engineer"],
  "register.read": everyone,
  "register.write": ["engineer"],
  "people.manage": ["administrator"],
  "site.manage": ["administrator"],
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof permissions;

/** Whether a person may do this: active, and holding one of the roles of the table. */
export function can(person: Pick<Person, "active" | "roles">, action: Action): boolean {
  const roles: readonly Role[] = permissions[action];
  return person.active && person.roles.some((role) => roles.includes(role));
}
