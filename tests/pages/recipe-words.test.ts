import { describe, expect, it } from "vitest";
import { usualForecast, worstRatio } from "@/components/recipe/forecast-recipe";
import { generateSeries } from "@/components/recipe/generate-series";
import { filterRecipes, readRecipeFilter } from "@/components/recipe/recipe-filter";
import { settlingWords, shortOhms } from "@/components/recipe/recipe-words";
import { demoBenches } from "@/lib/data/demo/demo-benches";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { demoModels } from "@/lib/data/demo/demo-units";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { THIN_SPACE } from "@/lib/units/format";

const benches = demoBenches(demoStandards(Date.UTC(2026, 5, 1)));

const recipes = demoRecipes.map(({ document, modelIds }, index): RecipeVersion => ({
  ...{ id: `v${index}`, recipeId: `r${index}`, version: 1, state: index === 1 ? "draft" : "released" },
  ...{ document, modelIds, changedBy: "Tomas Reyl", changedAtMs: 0 },
}));

function plain(text: string): string {
  return text.replaceAll(THIN_SPACE, " ");
}

describe("words of a recipe", () => {
  it.each([
    [100e3, "100 kΩ"],
    [1.5e9, "1.5 GΩ"],
    [90e9, "90 GΩ"],
    [4.7e6, "4.7 MΩ"],
    [1_234_567, "1.234567 MΩ"],
  ])("tell a resistance as short as it can be told: %d", (ohms, words) => expect(plain(shortOhms(ohms))).toBe(words));

  it("say each settling policy", () => {
    expect(plain(settlingWords({ kind: "fixed", waitSeconds: 3 }).detail)).toBe("3 s at every point");
    expect(plain(settlingWords({ kind: "scaled", baseSeconds: 4, timeConstants: 7 }).detail)).toBe(
      "4 s and 7 time constants of the point",
    );
    expect(plain(settlingWords(demoRecipes[0]!.document.sections[0]!.settling).detail)).toBe(
      "drift under 0.5 % a minute and spread under 0.5 % over 3 display steps, at least 5 s, at most 2 min",
    );
  });
});

describe("a generated series", () => {
  it("has the values of the series between both ends", () => {
    expect(generateSeries("1-2-5", "100k", "2 MΩ")).toEqual({ ok: true, values: [1e5, 2e5, 5e5, 1e6, 2e6] });
    // IEC 60063:2015, table of the E6 series.
    expect(generateSeries("E6", "1 GΩ", "10 GΩ")).toEqual({
      ok: true,
      values: [1e9, 1.5e9, 2.2e9, 3.3e9, 4.7e9, 6.8e9, 1e10],
    });
  });

  it.each([
    ["", "1M", "from"],
    ["1M", "far", "to"],
    ["10M", "1M", "to"],
    ["1.1M", "1.9M", "to"],
  ])("says at which end %j to %j is wrong", (from, to, at) =>
    expect(generateSeries("1-2-5", from, to)).toMatchObject({ ok: false, at }),
  );

  it("holds no more values than a section may", () =>
    expect(generateSeries("E24", "1", "1T")).toMatchObject({ ok: false, at: "to" }));
});

describe("the list of recipes", () => {
  const names = (filter: Record<string, string>) =>
    filterRecipes(recipes, readRecipeFilter(filter)).map(({ document }) => document.name);

  it("is narrowed by words, state and model", () => {
    expect(names({})).toHaveLength(recipes.length);
    expect(names({ search: "yearly 250" })).toEqual(["Three-voltage check"]);
    expect(names({ state: "draft" })).toEqual(["Full matrix"]);
    expect(names({ model: "sorrel-k2" })).toEqual(["Quick check", "Low range, 250 V and 500 V"]);
    expect(names({ state: "burnt" })).toHaveLength(recipes.length);
  });
});

describe("the forecast of a recipe", () => {
  it("is made on the first bench that can run any of it", () => {
    expect(usualForecast(recipes[0]!, benches, demoModels)?.bench.name).toBe("North bench");
    expect(usualForecast(recipes[0]!, [], demoModels)).toBeNull();
  });

  it("names the point whose limit is the smallest multiple of the standard's uncertainty", () => {
    const { plan } = usualForecast(recipes[0]!, benches, demoModels)!;
    const worst = worstRatio(plan)!;
    const ratios = plan.points.map((point) => point.limitOhms! / point.standardUncertaintyOhms);
    expect(worst.ratio).toBe(Math.min(...ratios.filter(Number.isFinite)));
  });
});
