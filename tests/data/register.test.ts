import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { demoBenches } from "@/lib/data/demo/demo-benches";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { demoModels, demoUnits } from "@/lib/data/demo/demo-units";
import type { Unit } from "@/lib/schemas/instrument";
import { NOW_MS, openTestRegister, type TestDatabase } from "./test-database";

let opened: TestDatabase;

beforeEach(async () => {
  opened = await openTestRegister();
});

afterEach(() => opened.close());

describe("the register", () => {
  it("gives back instruments and benches as they were entered", async () => {
    const { unitModels, units, standards, benches } = opened.repositories;
    const byId = (a: { id: string }, b: { id: string }) => (a.id < b.id ? -1 : 1);
    expect(await unitModels.list()).toEqual(demoModels.toSorted(byId));
    expect(await units.list("")).toEqual(demoUnits());
    expect(await standards.list()).toEqual(demoStandards(NOW_MS).toSorted(byId));
    expect(await benches.list()).toEqual(demoBenches(demoStandards(NOW_MS)));
  });

  it("gives a unit with its model", async () => {
    const unit = demoUnits().find(({ id }) => id === "tw-0409");
    expect(await opened.repositories.units.get("tw-0409")).toEqual(unit);
    expect(await opened.repositories.units.get("tw-9999")).toBeNull();
  });

  it.each([
    ["0409", ["TW-0409"]],
    [" p10-44 ", ["TW-0398"]],
    ["sorrel", ["TW-0433", "TW-0440"]],
    ["no such unit", []],
  ])("finds units by %j", async (search, found) => {
    const units = await opened.repositories.units.list(search);
    expect(units.map(({ assetNumber }) => assetNumber)).toEqual(found);
  });

  it("refuses a second unit of one asset number, and a unit of an unknown model", async () => {
    const { units } = opened.repositories;
    const unit: Unit = demoUnits()[0]!;
    await expect(units.create({ ...unit, id: "other" })).rejects.toThrow();
    const strange: Unit = { ...unit, id: "new", assetNumber: "TW-9999", model: { ...unit.model, id: "unknown" } };
    await expect(units.create(strange)).rejects.toThrow(/FOREIGN KEY/u);
  });

  it("refuses to read what was altered past the schemas", async () => {
    await opened.run("UPDATE unit_models SET document = '{}' WHERE id = 'sorrel-k2'");
    await expect(opened.repositories.units.list("")).rejects.toMatchObject({ name: "ZodError" });
  });
});

describe("people", () => {
  it("are found by e-mail in any case, with their password hash apart", async () => {
    const { people } = opened.repositories;
    const found = await people.findByEmail("Tomas.Reyl@Thornmere.example");
    expect(found).toMatchObject({ person: { roles: ["engineer", "technician"] }, passwordHash: "hash of still-water" });
    expect(Object.keys(found!.person).sort()).toEqual(["active", "email", "id", "name", "roles"]);
    expect(await people.get(found!.person.id)).toEqual(found!.person);
    expect(await people.findByEmail("nobody@thornmere.example")).toBeNull();
  });

  it("are listed by name and counted, the inactive too", async () => {
    const { people } = opened.repositories;
    const [first] = await people.list();
    await people.setActive(first!.id, false);
    expect((await people.list()).map(({ name, active }) => [name, active])).toEqual([
      ["Ada Fenn", false],
      ["Ines Marlow", true],
      ["Ruth Okafor", true],
      ["Sam Idris", true],
      ["Tomas Reyl", true],
    ]);
    expect(await people.count()).toBe(5);
  });

  it("have one e-mail address each", async () => {
    const draft = { name: "Ines Marlow", email: "INES.marlow@thornmere.example", roles: [], active: true };
    const again = { ...draft, roles: ["reviewer" as const] };
    await expect(opened.repositories.people.create(again, "")).rejects.toThrow();
    await expect(opened.repositories.people.create({ ...draft, email: "new@x.example" }, "")).rejects.toThrow();
    expect(await opened.repositories.people.count()).toBe(5);
  });
});

describe("settings and commands", () => {
  it("keep the last value of a setting", async () => {
    const { siteSettings } = opened.repositories;
    expect(await siteSettings.get("site.name")).toBe("Thornmere Wind Service");
    await siteSettings.set("site.name", "Elsewhere");
    expect(await siteSettings.get("site.name")).toBe("Elsewhere");
    expect(await siteSettings.get("unknown")).toBeNull();
  });

  it("let one of many claims of an id through, and keep its outcome", async () => {
    const { commandsSeen } = opened.repositories;
    expect(await commandsSeen.find("id")).toBeNull();
    const claims = await Promise.all(["a", "b", "c"].map((outcome) => commandsSeen.claim("id", outcome)));
    expect(claims).toEqual([true, false, false]);
    expect(await commandsSeen.find("id")).toBe("a");
  });
});
