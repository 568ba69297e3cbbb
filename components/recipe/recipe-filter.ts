import type { RecipeVersion } from "@/lib/schemas/recipe";

export interface RecipeFilter {
  search: string;
  /** A state, or empty for all. */
  state: RecipeVersion["state"] | "";
  /** A model's id, or empty for all. */
  model: string;
}

/** Recipes whose name or purpose holds every word, in a state, for a model. A recipe that names no model is for all. */
export function filterRecipes(recipes: readonly RecipeVersion[], filter: RecipeFilter): RecipeVersion[] {
  const words = filter.search.toLowerCase().split(/\s+/u).filter(Boolean);
  return recipes.filter(({ document, state, modelIds }) => {
    const text = `${document.name} ${document.purpose}`.toLowerCase();
    const isForModel = filter.model === "" || modelIds.length === 0 || modelIds.includes(filter.model);
    return words.every((word) => text.includes(word)) && (filter.state === "" || filter.state === state) && isForModel;
  });
}

type Params = Readonly<Record<string, string | string[] | undefined>>;

const states: readonly RecipeVersion["state"][] = ["draft", "released", "withdrawn"];

/** The filter that a URL asks for; a part that makes no sense counts as not given. */
export function readRecipeFilter({ search, state, model }: Params): RecipeFilter {
  return {
    search: typeof search === "string" ? search.slice(0, 80) : "",
    state: states.find((known) => known === state) ?? "",
    model: typeof model === "string" ? model : "",
  };
}
