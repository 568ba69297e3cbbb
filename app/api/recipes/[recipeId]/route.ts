import { can } from "@/lib/auth/permissions";
import { AppError } from "@/lib/server/app-error";
import { handler, readJson } from "@/lib/server/handler";
import { readRecipe } from "@/lib/server/read-recipe";
import { getServices } from "@/lib/server/services";

export const GET = handler<{ recipeId: string }>("recipe.read", async ({ params }) => {
  const versions = await getServices().repositories.recipes.versions(params.recipeId);
  if (versions.length === 0) throw new AppError("not-found", "There is no such recipe.");
  return Response.json(versions);
});

export const POST = handler<{ recipeId: string }>("recipe.write", async ({ request, params, person }) => {
  const { recipes } = getServices().repositories;
  const recipe = await readRecipe(await readJson(request));
  if (recipe.release && !can(person, "recipe.release"))
    throw new AppError("forbidden", "Your role does not release recipes.");
  if ((await recipes.versions(params.recipeId)).length === 0)
    throw new AppError("not-found", "There is no such recipe.");
  return Response.json(await recipes.save(params.recipeId, recipe, person.name), { status: 201 });
});
