import { notFound } from "next/navigation";
import type { RecipeRegister } from "@/components/recipe/use-recipe-editor";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { getServices } from "@/lib/server/services";

/** What recipes are planned with: models, standards and benches. */
export async function loadRegister(): Promise<RecipeRegister> {
  const { unitModels, standards, benches } = getServices().repositories;
  const [models, boxes, places] = await Promise.all([unitModels.list(), standards.list(), benches.list()]);
  return { models, standards: boxes, benches: places };
}

/** All versions of a recipe, newest first. Not found for an unknown one. */
export async function loadVersions(recipeId: string): Promise<[RecipeVersion, ...RecipeVersion[]]> {
  const [newest, ...earlier] = await getServices().repositories.recipes.versions(recipeId);
  if (!newest) notFound();
  return [newest, ...earlier];
}
