import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { can, permissions, type Action } from "@/lib/auth/permissions";
import { roleSchema, type Role } from "@/lib/schemas/person";

const actions = Object.keys(permissions) as Action[];

/** What each role may do, written out a second time. */
const expected: Readonly<Record<Role, readonly Action[]>> = {
  technician: ["run.start", "run.hold", "run.resume", "run.skip", "run.stop"],
  engineer: [
    ...(["run.start", "run.hold", "run.resume", "run.skip", "run.stop"] as const),
    ...(["recipe.write", "recipe.release", "register.write"] as const),
  ],
  supervisor: ["run.hold", "run.stop"],
  reviewer: ["run.decide"],
  administrator: ["people.manage", "site.manage"],
};
const forEveryone: readonly Action[] = ["bench.watch", "run.watch", "recipe.read", "register.read"];

function allowed(roles: Role[], active = true): Action[] {
  return actions.filter((action) => can({ active, roles }, action)).sort();
}

describe("the table of permissions", () => {
  it.each(roleSchema.options)("lets a %s do this and no more", (role) => {
    expect(allowed([role])).toEqual([...expected[role], ...forEveryone].sort());
  });

  it("names for each action a role that may do it", () => {
    expect(actions.filter((action) => permissions[action].length === 0)).toEqual([]);
    expect(allowed([...roleSchema.options])).toEqual(actions.toSorted());
  });

  it("adds up the roles of a person", () => {
    expect(allowed(["reviewer", "technician"])).toEqual(
      [...expected.reviewer, ...expected.technician, ...forEveryone].sort(),
    );
  });

  it("lets nobody without a role, and nobody inactive, do anything", () => {
    expect(allowed([])).toEqual([]);
    expect(allowed([...roleSchema.options], false)).toEqual([]);
  });

  it("can be loaded by a browser: it imports types alone", () => {
    const text = readFileSync(fileURLToPath(new URL("../../lib/auth/permissions.ts", import.meta.url)), "utf8");
    expect(text.match(/^import .*$/gmu)?.filter((line) => !line.startsWith("import type "))).toEqual([]);
  });
});
