import { afterEach, describe, expect, it } from "vitest";
import { statedLimit } from "@/lib/metrology/accuracy";
import { demoBenches } from "@/lib/data/demo/demo-benches";
import { demoPeople } from "@/lib/data/demo/demo-people";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { demoModels, demoUnits } from "@/lib/data/demo/demo-units";
import { layDemoRegister } from "@/lib/data/demo/lay-demo-register";
import { planRun } from "@/lib/planning/plan";
import { findRecipeProblems } from "@/lib/planning/recipe-problems";
import { roleSchema } from "@/lib/schemas/person";
import { NOW_MS, openTestDatabase, type TestDatabase } from "./test-database";

const standards = demoStandards(NOW_MS);
const benches = demoBenches(standards);
const room = { celsius: 22.8, humidityPercent: 41 };

function planOf(recipeName: string, modelId: string, benchId: string) {
  return planRun({
    document: demoRecipes.find(({ document }) => document.name === recipeName)!.document,
    bench: benches.find(({ id }) => id === benchId)!,
    model: demoModels.find(({ id }) => id === modelId)!,
    room,
  });
}

describe("the demo laboratory", () => {
  it.each(["north", "window"])("runs its whole matrix at %s", (bench) => {
    expect(planOf("Full matrix", "pellham-ir-10", bench)).toMatchObject({ points: { length: 65 }, excluded: [] });
    const yearly = planOf("Five-voltage accuracy", "pellham-ir-10", bench);
    expect(yearly.points).toHaveLength(63);
    expect(yearly.excluded.map(({ nominalOhms, testVolts, cause }) => [nominalOhms, testVolts, cause])).toEqual([
      [50e9, 50, "recipe"],
      [90e9, 50, "recipe"],
    ]);
    expect(planOf("Quick check", "pellham-ir-10", bench).points).toHaveLength(9);
  });

  it("keeps its small box from more than it is rated for, and says why", () => {
    const { points, excluded } = planOf("Full matrix", "pellham-ir-10", "cold-room");
    expect(points.length).toBeGreaterThan(10);
    expect(Math.max(...points.map(({ highestVolts }) => highestVolts))).toBeLessThanOrEqual(250);
    expect(new Set(excluded.map(({ cause }) => cause))).toEqual(new Set(["rating", "setting"]));
    expect(excluded.find(({ testVolts, nominalOhms }) => testVolts === 500 && nominalOhms === 1e6)?.reason).toMatch(
      /^the box would stand 600\sV, rated 250\sV$/u,
    );
  });

  it("has recipes without a fault, each with a limit at every point of its models", () => {
    for (const { document, modelIds } of demoRecipes) {
      const models = demoModels.filter(({ id }) => modelIds.includes(id));
      expect(models).toHaveLength(modelIds.length);
      expect(findRecipeProblems(document, { models, standards }), document.name).toEqual([]);
      for (const model of models) {
        const { points } = planRun({ document, bench: benches[0]!, model, room });
        expect(points.filter(({ limitOhms }) => limitOhms === null)).toEqual([]);
      }
    }
  });

  it("has units that differ in kind: sound, leaky, with an offset current, out of gain", () => {
    const physics = demoUnits().map(({ simulation }) => simulation!);
    expect(physics.some(({ leakageSiemens }) => leakageSiemens > 0)).toBe(true);
    expect(physics.filter(({ offsetAmperes }) => offsetAmperes > 0.1e-9).map((unit) => unit.offsetAmperes)).toEqual([
      0.32e-9,
    ]);
    expect(physics.some(({ gainError }) => gainError > 0.01)).toBe(true);
    expect(
      physics.filter(({ leakageSiemens, offsetAmperes }) => leakageSiemens === 0 && offsetAmperes < 1e-11).length,
    ).toBeGreaterThan(2);
    expect(new Set(physics.map(({ seed }) => seed)).size).toBe(physics.length);
  });

  it("states a limit that grows with resistance and as the test voltage falls", () => {
    const { accuracy, ranges } = demoModels[0]!;
    // 3 % + 0.036 % a gigaohm at 250 V: 3 + 0.036 · 50 = 4.8 per cent of 50 GΩ.
    expect(statedLimit(accuracy, ranges, 250, 50e9)!.limitOhms).toBeCloseTo(0.048 * 50e9, 0);
    // 3 % + 0.009 % a gigaohm at 1000 V: 3.81 per cent of 90 GΩ.
    expect(statedLimit(accuracy, ranges, 1000, 90e9)!.limitOhms).toBeCloseTo(0.0381 * 90e9, 0);
  });

  it("has a display of about 4000 counts a decade, coarser from 4 GΩ on", () => {
    const { ranges } = demoModels[0]!;
    const counts = ranges.map(({ toOhms, resolutionOhms }) => Math.round(toOhms / resolutionOhms));
    expect(counts).toEqual([4000, 4000, 4000, 4000, 4000, 1000, 400, 100, 40]);
  });

  it("has a standard that falls due in eleven days, others later", () => {
    const dueOn = Object.fromEntries(standards.map(({ id, calibration }) => [id, calibration.dueOn]));
    expect(dueOn["db-9-2"]).toBe("2026-12-12");
    expect(dueOn["db-9-1"]! > "2027-01-01" && dueOn["db-3"]! > "2027-01-01").toBe(true);
    for (const { calibration } of standards) expect(calibration.calibratedOn < calibration.dueOn).toBe(true);
  });

  it("has a person for every role", () => {
    expect(new Set(demoPeople.flatMap(({ roles }) => roles))).toEqual(new Set(roleSchema.options));
  });
});

describe("laying it", () => {
  let opened: TestDatabase;

  afterEach(() => opened.close());

  it("is taken up again where a kill cut it off", async () => {
    opened = await openTestDatabase();
    const { repositories } = opened;
    const lay = (create = repositories.recipes.create) =>
      layDemoRegister({
        repositories: { ...repositories, recipes: { ...repositories.recipes, create } },
        hashPassword: async () => "",
        nowMs: NOW_MS,
      });
    await expect(lay(() => Promise.reject(new Error("killed")))).rejects.toThrow("killed");
    expect(await repositories.people.count()).toBe(0);
    await lay();
    expect(await repositories.people.count()).toBe(demoPeople.length);
    expect(await repositories.recipes.listReleased()).toHaveLength(demoRecipes.length);
    expect(await repositories.units.list("")).toEqual(demoUnits());
  });
});
