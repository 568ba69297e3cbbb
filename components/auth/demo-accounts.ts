import { roleSchema, type Person, type Role } from "@/lib/schemas/person";

/** Everyone's password in the demo laboratory. */
export const DEMO_PASSWORD = "still-water";

export interface DemoAccount {
  role: Role;
  /** The part of the address before the @. */
  shortName: string;
  email: string;
}

/** Everyone who may sign in, by their first role in the order of the roles. */
export function demoAccounts(people: readonly Person[]): DemoAccount[] {
  const rank = ({ role }: DemoAccount) => roleSchema.options.indexOf(role);
  return people
    .filter(({ active }) => active)
    .map(({ roles, email }) => ({ role: roles[0]!, shortName: email.split("@")[0]!, email }))
    .sort((a, b) => rank(a) - rank(b));
}
