import { planRun } from "@/lib/planning/plan";
import type { Bench } from "@/lib/schemas/bench";
import type { UnitModel } from "@/lib/schemas/instrument";
import type { Plan, PlannedPoint } from "@/lib/schemas/plan";
import type { RecipeDocument, RecipeVersion } from "@/lib/schemas/recipe";

export interface RecipeForecast {
  bench: Bench;
  model: UnitModel;
  plan: Plan;
  seconds: number;
}

/** What a recipe comes to on a bench, in a room at the standard's reference temperature. */
export function forecastOn(document: RecipeDocument, bench: Bench, model: UnitModel): RecipeForecast {
  const room = { celsius: bench.standard.referenceCelsius, humidityPercent: null };
  const plan = planRun({ document, bench, model, room });
  return { bench, model, plan, seconds: plan.points.reduce((sum, point) => sum + point.forecastSeconds, 0) };
}

/** The forecast on the first bench of the site that can run any of its points; null when none can. */
export function usualForecast(
  { document, modelIds }: Pick<RecipeVersion, "document" | "modelIds">,
  benches: readonly Bench[],
  models: readonly UnitModel[],
): RecipeForecast | null {
  const model = models.find(({ id }) => modelIds.includes(id)) ?? models[0];
  if (!model) return null;
  for (const bench of benches) {
    const forecast = forecastOn(document, bench, model);
    if (forecast.plan.points.length > 0) return forecast;
  }
  return null;
}

/** Models that a recipe is for, in the order of the register; all of them when it names none. */
export function modelsOf(modelIds: readonly string[], models: readonly UnitModel[]): UnitModel[] {
  const chosen = models.filter(({ id }) => modelIds.includes(id));
  return chosen.length > 0 ? chosen : [...models];
}

/** The point where the unit's limit is the smallest multiple of the standard's expanded uncertainty; null without limits. */
export function worstRatio(plan: Plan): { point: PlannedPoint; ratio: number } | null {
  const ratios = plan.points.flatMap((point) =>
    point.limitOhms === null || point.standardUncertaintyOhms === 0
      ? []
      : [{ point, ratio: point.limitOhms / point.standardUncertaintyOhms }],
  );
  return ratios.reduce<(typeof ratios)[number] | null>(
    (worst, each) => (worst && worst.ratio <= each.ratio ? worst : each),
    null,
  );
}
