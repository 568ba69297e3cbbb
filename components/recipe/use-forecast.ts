import { useMemo, useState } from "react";
import type { Bench } from "@/lib/schemas/bench";
import type { UnitModel } from "@/lib/schemas/instrument";
import type { RecipeDocument } from "@/lib/schemas/recipe";
import { forecastOn, modelsOf, usualForecast, type RecipeForecast } from "./forecast-recipe";

interface ForecastInput {
  document: RecipeDocument | null;
  modelIds: readonly string[];
  benches: readonly Bench[];
  models: readonly UnitModel[];
}

export interface ForecastChoice {
  forecast: RecipeForecast | null;
  /** Models that may be chosen: those that the recipe is for. */
  models: readonly UnitModel[];
  chooseBench: (benchId: string) => void;
  chooseModel: (modelId: string) => void;
}

/** The forecast of a recipe for a bench and a model that may be changed. */
export function useForecast({ document, modelIds, benches, models }: ForecastInput): ForecastChoice {
  const [benchId, chooseBench] = useState<string | null>(null);
  const [modelId, chooseModel] = useState<string | null>(null);
  const forecast = useMemo(() => {
    if (!document) return null;
    const among = modelsOf(modelIds, models);
    const model = among.find(({ id }) => id === modelId) ?? among[0];
    const bench = benches.find(({ id }) => id === benchId);
    if (bench && model) return forecastOn(document, bench, model);
    const usual = usualForecast({ document, modelIds: model ? [model.id] : [] }, benches, models);
    return usual ?? (benches[0] && model ? forecastOn(document, benches[0], model) : null);
  }, [document, modelIds, benches, models, benchId, modelId]);
  return { forecast, models: modelsOf(modelIds, models), chooseBench, chooseModel };
}
