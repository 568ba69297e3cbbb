import { describe, expect, it } from "vitest";
import { parseList } from "@/components/recipe/parse-list";
import { fieldProblems, parseRecipeForm } from "@/components/recipe/parse-recipe-form";
import { countPoints, emptyRecipeForm, recipeFormOf, withCell, type RecipeForm } from "@/components/recipe/recipe-form";
import { understoodOhms, understoodVolts } from "@/components/recipe/recipe-words";
import { demoModels } from "@/lib/data/demo/demo-units";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { parseOhms, parseVolts } from "@/lib/units/parse";
import { ohms, volts } from "@/lib/units/quantities";

const standards = demoStandards(Date.UTC(2026, 5, 1));
const pellham = demoModels.find(({ id }) => id === "pellham-ir-10")!;
const surroundings = { models: [pellham], standards };

const good: RecipeForm = {
  ...emptyRecipeForm,
  name: "Yearly check",
  resistances: "100k; 1 MΩ; 10 MΩ\n1,5 GΩ",
  voltages: "250 V, 500 V, 1 kV",
  modelIds: [pellham.id],
};

function problemsOf(change: Partial<RecipeForm>) {
  return parseRecipeForm({ ...good, ...change }, surroundings).problems;
}

describe("a typed or pasted list", () => {
  it.each([
    ["100k\n500k\n1M", [100e3, 500e3, 1e6]],
    ["100 kΩ;500 kΩ;1 MΩ", [100e3, 500e3, 1e6]],
    ["1 MΩ\t100 kΩ", [100e3, 1e6]],
    ["100k, 1M, 1G", [100e3, 1e6, 1e9]],
    ["100k,1M,1G", [100e3, 1e6, 1e9]],
    ["1,5 GΩ", [1.5e9]],
    ["1,5G; 2,2G", [1.5e9, 2.2e9]],
    ["", []],
  ])("reads %j", (text, values) => expect(parseList(text, parseOhms).values).toEqual(values));

  it("puts values in rising order and each once, and says how many stood twice", () => {
    expect(parseList("500\n250\n500\n1000", parseVolts)).toEqual({
      values: [250, 500, 1000],
      repeated: 1,
      problems: [],
    });
  });

  it("keeps the readable entries and names the others", () => {
    const parsed = parseList("100k\nten meg\n1M", parseOhms);
    expect(parsed.values).toEqual([100e3, 1e6]);
    expect(parsed.problems).toEqual(["“ten meg” is not a resistance such as 10 MΩ."]);
  });

  it("is echoed as it was understood", () => {
    expect(understoodOhms(parseList("100k\n1,5G\n90 GOhm", parseOhms).values)).toBe(
      "3 values, 100\u2009kΩ to 90\u2009GΩ",
    );
    expect(understoodVolts([500])).toBe("1 value, 500\u2009V");
    expect(understoodOhms([])).toBe("nothing yet");
  });
});

describe("the form of a recipe", () => {
  it("gives a document when everything is right", () => {
    const { document, problems } = parseRecipeForm(good, surroundings);
    expect(problems).toEqual({});
    expect(document?.sections[0]?.nominalOhms).toEqual([100e3, 1e6, 10e6, 1.5e9]);
    expect(document?.sections[0]?.testVolts).toEqual([250, 500, 1000]);
  });

  it("comes back from its document as it was", () => {
    for (const recipe of demoRecipes) {
      const form = recipeFormOf(recipe.document, recipe.modelIds);
      const models = demoModels.filter(({ id }) => recipe.modelIds.includes(id));
      expect(parseRecipeForm(form, { models, standards }).document).toEqual(recipe.document);
    }
  });

  it("asks for at least one resistance and one voltage", () => {
    expect(problemsOf({ resistances: "" }).resistances).toEqual(["Enter at least one resistance."]);
    expect(problemsOf({ voltages: " " }).voltages).toEqual(["Enter at least one test voltage."]);
  });

  it("names a resistance that no standard can make", () => {
    const { resistances } = problemsOf({ resistances: "1 MΩ, 500 GΩ" });
    expect(resistances).toHaveLength(1);
    expect(resistances?.[0]).toMatch(/^No standard makes 500\.0\u2009GΩ: /u);
  });

  it("names a test voltage that the unit does not have", () => {
    const { voltages } = problemsOf({ voltages: "250 V, 2500 V" });
    expect(voltages?.[0]).toMatch(/^2500\u2009V is not to be had: Pellham IR-10 has 50\u2009V/u);
  });

  it("refuses a recipe with every point left out", () => {
    const cells = [100e3, 1e6, 10e6, 1.5e9].flatMap((value) =>
      [250, 500, 1000].map((testVolts) => ({ nominalOhms: ohms(value), testVolts: volts(testVolts) })),
    );
    const emptied = cells.reduce((form, cell) => withCell(form, cell, false), good);
    expect(problemsOf(emptied).points).toEqual(["Every point is left out. Keep at least one."]);
    expect(parseRecipeForm(withCell(emptied, cells[0]!, true), surroundings).problems).toEqual({});
  });

  it("forgets left-out cells whose resistance or voltage is gone", () => {
    const form = withCell(good, { nominalOhms: ohms(1e6), testVolts: volts(250) }, false);
    const { document } = parseRecipeForm({ ...form, resistances: "100k" }, surroundings);
    expect(document?.sections[0]?.excluded).toEqual([]);
    expect(countPoints(parseRecipeForm(form, surroundings).document!.sections[0]!)).toBe(11);
  });

  it.each([
    [{ readings: "" }, "readings", "Enter a number."],
    [{ readings: "2.5" }, "readings", "Enter a whole number."],
    [{ readings: "0" }, "readings", "Enter at least 1."],
    [{ name: "  " }, "name", "Give the recipe a name."],
    [{ name: "x".repeat(81) }, "name", "Use at most 80 characters."],
    [{ settling: { ...good.settling, spreadPercent: "0" } }, "spreadPercent", "Enter more than 0."],
    [{ settling: { ...good.settling, leastSeconds: "5 min" } }, "leastSeconds", "Enter a number."],
    [
      { settling: { ...good.settling, leastSeconds: "200" } },
      "mostSeconds",
      "The greatest wait is longer than the least wait.",
    ],
    [{ settling: { ...good.settling, kind: "fixed", waitSeconds: "-1" } }, "waitSeconds", "Enter at least 0."],
  ] as const)("says at the field what is wrong with %j", (change, field, message) =>
    expect(problemsOf(change)[field]).toEqual([message]),
  );

  it("judges only the fields of the chosen settling policy", () => {
    expect(problemsOf({ settling: { ...good.settling, kind: "fixed", mostSeconds: "never" } })).toEqual({});
  });

  it("takes a decimal comma in a number", () => {
    const { document } = parseRecipeForm(
      { ...good, settling: { ...good.settling, driftPercentPerMinute: "0,5" } },
      surroundings,
    );
    expect(document?.sections[0]?.settling).toMatchObject({ driftPercentPerMinute: 0.5 });
  });
});

describe("problems that the server sends", () => {
  it("stand at the fields they speak of", () => {
    const sorted = fieldProblems([
      { path: ["document", "name"], message: "Give the recipe a name." },
      { path: ["document", "sections", 0, "nominalOhms", 3], message: "No standard makes 500 GΩ." },
      {
        path: ["document", "sections", 0, "settling", "mostSeconds"],
        message: "Too big: expected number to be <=7200",
      },
      { path: ["modelIds", 0], message: "This model is not in the register." },
      { path: [], message: "Something else." },
    ]);
    expect(sorted).toEqual({
      name: ["Give the recipe a name."],
      resistances: ["No standard makes 500 GΩ."],
      mostSeconds: ["Enter at most 7200."],
      models: ["This model is not in the register."],
      form: ["Something else."],
    });
  });
});
