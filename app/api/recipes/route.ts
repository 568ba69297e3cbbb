import { can } from "@/lib/auth/permissions";
import { AppError } from "@/lib/server/app-error";
import { handler, readJson } from "@/lib/server/handler";
import { readRecipe } from "@/lib/server/read-recipe";
import { getServices } from "@/lib/server/services";

export const GET = handler("recipe.read", async () => Response.json(await getServices().repositories.recipes.list()));

export const POST = handler("recipe.write", async ({ request, person }) => {
  const recipe = await readRecipe(await readJson(request));
  if (recipe.release && !can(person, "recipe.release"))
    throw new AppError("forbidden", "Your role does not release recipes.");
  return Response.json(await getServices().repositories.recipes.create(recipe, person.name), { status: 201 });
});
