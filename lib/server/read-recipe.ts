import { findRecipeProblems } from "@/lib/planning/recipe-problems";
import { saveRecipeSchema, type SaveRecipe } from "@/lib/schemas/run";
import { AppError } from "./app-error";
import { getServices } from "./services";

/** A recipe that the laboratory can run, from a request's body. Throws ZodError or AppError `invalid` with each problem at its field. */
export async function readRecipe(body: unknown): Promise<SaveRecipe> {
  const recipe = saveRecipeSchema.parse(body);
  const { unitModels, standards } = getServices().repositories;
  const [models, allStandards] = await Promise.all([unitModels.list(), standards.list()]);
  const problems = findRecipeProblems(recipe.document, {
    models: models.filter(({ id }) => recipe.modelIds.includes(id)),
    standards: allStandards,
  }).map(({ path, message }) => ({ path: ["document", ...path], message }));
  if (problems.length > 0) throw new AppError("invalid", problems[0]!.message, { problems });
  return recipe;
}
