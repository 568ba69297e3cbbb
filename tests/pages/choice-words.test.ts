import { describe, expect, it } from "vitest";
import { excludedGroups } from "@/components/recipe/excluded-groups";
import { forecastWords, lastRunOf, lastRunWords, proposedCondition, recipesFor } from "@/components/start/choice-words";
import { demoBenches } from "@/lib/data/demo/demo-benches";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { demoUnits } from "@/lib/data/demo/demo-units";
import { planRun } from "@/lib/planning/plan";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import type { RunSummary } from "@/lib/schemas/run";

const DAY_MS = 86_400_000;
const nowMs = Date.UTC(2026, 5, 30);
const unit = demoUnits().find(({ assetNumber }) => assetNumber === "TW-0412")!;
const north = demoBenches(demoStandards(nowMs))[0]!;
const room = { celsius: 22.8, humidityPercent: 41 };

function ranDaysAgo(days: number, change: Partial<RunSummary> = {}): RunSummary {
  const none = { inside: 0, doubtful: 0, outside: 0, unsettled: 0, notStated: 0, skipped: 0, open: 0, total: 0 };
  return {
    ...{ id: `run-${days}`, number: 1, status: "finished", benchId: "north", benchName: "North bench" },
    ...{ unitId: unit.id, unitName: "Pellham IR-10", assetNumber: "TW-0412", recipeId: "r", recipeName: "Quick check" },
    ...{ recipeVersion: 1, condition: "as-found", startedBy: "Ines Marlow", endedAtMs: null, stairs: [] },
    startedAtMs: nowMs - days * DAY_MS,
    counts: { ...none, inside: 62, total: 62 },
    ...change,
  };
}

describe("the last run of a unit", () => {
  it("is its latest one that is over", () => {
    const runs = [
      ranDaysAgo(400),
      ranDaysAgo(28),
      ranDaysAgo(0, { status: "running" }),
      ranDaysAgo(1, { unitId: "x" }),
    ];
    expect(lastRunOf(unit.id, runs)?.id).toBe("run-28");
    expect(lastRunOf(unit.id, [])).toBeNull();
  });

  it("is said in words", () => {
    expect(lastRunWords(ranDaysAgo(28), () => "2 Jun 2026")).toBe("Last run 2 Jun 2026, all 62 inside.");
    expect(lastRunWords(null, () => "")).toBe("No run of this unit yet.");
  });

  it("proposes as found for a unit that has not run in the last 30 days", () => {
    expect(proposedCondition(null, nowMs)).toBe("as-found");
    expect(proposedCondition(ranDaysAgo(31), nowMs)).toBe("as-found");
    expect(proposedCondition(ranDaysAgo(30), nowMs)).toBe("as-left");
  });
});

describe("the choice of a recipe", () => {
  const versions = demoRecipes.map(({ document, modelIds }, index): RecipeVersion => ({
    ...{ id: `v${index}`, recipeId: `r${index}`, version: 1, state: "released", changedBy: "Tomas Reyl" },
    ...{ document, modelIds, changedAtMs: nowMs },
  }));

  it("has the recipes of the unit's model first and loses none", () => {
    const { forModel, others } = recipesFor(unit, versions);
    expect(forModel.map(({ document }) => document.name)).toEqual([
      "Five-voltage accuracy",
      "Full matrix",
      "Three-voltage check",
      "Quick check",
    ]);
    expect(forModel.length + others.length).toBe(versions.length);
  });

  it("counts its points and says how long they take, on the bench and here", () => {
    const plan = planRun({ document: demoRecipes[0]!.document, bench: north, model: unit.model, room });
    const seconds = plan.points.reduce((sum, point) => sum + point.forecastSeconds, 0);
    const points = String(plan.points.length);
    expect(forecastWords(plan, 1)).toMatch(
      new RegExp(`^${points} points, about ${Math.round(seconds / 60)}\u2009min$`, "u"),
    );
    expect(forecastWords(plan, 60)).toMatch(/, at 60× about \d+\u2009s$/u);
    expect(forecastWords({ points: [], excluded: [] }, 60)).toBe("no point can be run");
  });

  it("names the points that are left out, with their reasons", () => {
    const plan = planRun({ document: demoRecipes[0]!.document, bench: north, model: unit.model, room });
    const groups = excludedGroups(plan.excluded);
    expect(groups[0]).toEqual({
      reason: "left out in the recipe",
      cells: "50\u2009GΩ and 90\u2009GΩ at 50\u2009V",
      count: 2,
    });
    const cold = demoBenches(demoStandards(nowMs))[2]!;
    const onCold = planRun({ document: demoRecipes[0]!.document, bench: cold, model: unit.model, room });
    expect(excludedGroups(onCold.excluded).map(({ cells }) => cells.replaceAll("\u2009", " "))).toContain(
      "500 MΩ at 50 V, 100 V, 250 V, 500 V and 1000 V",
    );
    expect(groups.reduce((sum, { count }) => sum + count, 0)).toBe(plan.excluded.length);
  });
});
