import type { Person } from "@/lib/schemas/person";

/** Everyone's password in the demo laboratory. */
export const DEMO_PASSWORD = "still-water";

export interface DemoAccount {
  role: string;
  /** The part of the address before the @. */
  shortName: string;
  email: string;
}

/** One account for each role, by the first role of each person. */
export function demoAccounts(people: readonly Person[]): DemoAccount[] {
  return people
    .filter(({ active }) => active)
    .map(({ roles, email }) => ({ role: roles[0]!, shortName: email.split("@")[0]!, email }));
}
