import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import type { SaveRecipe } from "@/lib/schemas/run";
import { openTestDatabase, type TestDatabase } from "./test-database";

let opened: TestDatabase;

beforeEach(async () => {
  opened = await openTestDatabase();
});

afterEach(() => opened.close());

const recipes = () => opened.repositories.recipes;

function recipe(name: string, release: boolean): SaveRecipe {
  return { ...demoRecipes[0]!, document: { ...demoRecipes[0]!.document, name }, release };
}

describe("a recipe", () => {
  it("keeps one draft, which is changed in place", async () => {
    const first = await recipes().create(recipe("Check", false), "Tomas Reyl");
    const second = await recipes().save(first.recipeId, recipe("Better check", false), "Ines Marlow");
    expect(second).toMatchObject({ id: first.id, version: 1, state: "draft", changedBy: "Ines Marlow" });
    expect(await recipes().versions(first.recipeId)).toEqual([second]);
    expect(await recipes().listReleased()).toEqual([]);
  });

  it("begins a next version when the released one is saved over", async () => {
    const first = await recipes().create(recipe("Check", true), "Tomas Reyl");
    const second = await recipes().save(first.recipeId, recipe("Better check", false), "Tomas Reyl");
    expect(second).toMatchObject({ version: 2, state: "draft" });
    expect(await recipes().getVersion(first.id)).toEqual(first);
    expect(await recipes().list()).toEqual([second]);
    expect(await recipes().listReleased()).toEqual([first]);
    const released = await recipes().save(first.recipeId, recipe("Best check", true), "Tomas Reyl");
    expect(released).toMatchObject({ id: second.id, version: 2, state: "released" });
    expect(await recipes().listReleased()).toEqual([released]);
  });

  it("gives each version one number when two people save at once", async () => {
    const first = await recipes().create(recipe("Check", true), "Tomas Reyl");
    await Promise.all(["A", "B", "C"].map((name) => recipes().save(first.recipeId, recipe(name, true), name)));
    expect((await recipes().versions(first.recipeId)).map(({ version }) => version)).toEqual([4, 3, 2, 1]);
  });

  it("that nobody made can't be saved over", async () => {
    await expect(recipes().save("unknown", recipe("Check", false), "x")).rejects.toMatchObject({
      code: "unknown-record",
    });
    expect(await recipes().versions("unknown")).toEqual([]);
    expect(await recipes().getVersion("unknown")).toBeNull();
  });

  it("that breaks its schema is not stored", async () => {
    const { document } = recipe("Check", false);
    const empty = { ...document, sections: [{ ...document.sections[0]!, nominalOhms: [] }] };
    await expect(recipes().create({ document: empty, modelIds: [], release: false }, "x")).rejects.toThrow();
    expect(await recipes().list()).toEqual([]);
  });
});

describe("the database itself", () => {
  it.each([
    "UPDATE recipe_versions SET document = '{}'",
    "UPDATE recipe_versions SET model_ids = '[]'",
    "UPDATE recipe_versions SET version = 7",
    "UPDATE recipe_versions SET changed_by = 'nobody'",
    "UPDATE recipe_versions SET state = 'draft'",
    "DELETE FROM recipe_versions",
  ])("refuses %s once the version is released", async (statement) => {
    const released = await recipes().create(recipe("Check", true), "Tomas Reyl");
    await expect(opened.run(statement)).rejects.toMatchObject({
      original: { message: expect.stringContaining("a released recipe version") as string },
    });
    expect(await recipes().getVersion(released.id)).toEqual(released);
  });

  it("lets a released version be withdrawn", async () => {
    const released = await recipes().create(recipe("Check", true), "Tomas Reyl");
    await opened.run("UPDATE recipe_versions SET state = 'withdrawn'");
    expect(await recipes().listReleased()).toEqual([]);
    expect(await recipes().save(released.recipeId, recipe("Check", false), "x")).toMatchObject({ version: 2 });
  });
});
