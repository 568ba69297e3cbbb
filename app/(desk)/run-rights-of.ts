import type { RunRights } from "@/components/run-views/run-rights";
import { can } from "@/lib/auth/permissions";
import type { Person } from "@/lib/schemas/person";

export function runRightsOf(person: Person): RunRights {
  return {
    hold: can(person, "run.hold"),
    resume: can(person, "run.resume"),
    skip: can(person, "run.skip"),
    stop: can(person, "run.stop"),
  };
}
