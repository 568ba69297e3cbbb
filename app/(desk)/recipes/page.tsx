import type { Metadata } from "next";
import { usualForecast } from "@/components/recipe/forecast-recipe";
import { filterRecipes, readRecipeFilter } from "@/components/recipe/recipe-filter";
import { RecipeFilterBar } from "@/components/recipe/recipe-filter-bar";
import { RecipesTable } from "@/components/recipe/recipes-table";
import { PageFrame } from "@/components/run-views/page-frame";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { can } from "@/lib/auth/permissions";
import { requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export const metadata: Metadata = { title: "Recipes" };

interface RecipesPageProps {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function RecipesPage({ searchParams }: RecipesPageProps) {
  const person = await requirePerson("recipe.read");
  const { repositories } = getServices();
  const [recipes, models, benches] = await Promise.all([
    repositories.recipes.list(),
    repositories.unitModels.list(),
    repositories.benches.list(),
  ]);
  const chosen = filterRecipes(recipes, readRecipeFilter(await searchParams));
  const rows = chosen.map((recipe) => ({ recipe, forecast: usualForecast(recipe, benches, models) }));
  const mayWrite = can(person, "recipe.write");
  return (
    <PageFrame>
      <div className="flex items-center gap-4">
        <h1 className="mr-auto">Recipes</h1>
        {mayWrite && (
          <Button href="/recipes/new" variant="main">
            Write a recipe
          </Button>
        )}
      </div>
      {recipes.length > 0 && (
        <RecipeFilterBar models={models.map(({ id, maker, model }) => ({ id, name: `${maker} ${model}` }))} />
      )}
      <section aria-label="Recipes" className="rounded border border-line bg-panel">
        {rows.length > 0 ? (
          <RecipesTable rows={rows} models={models} />
        ) : (
          <NoRecipes isFiltered={recipes.length > 0} mayWrite={mayWrite} />
        )}
      </section>
    </PageFrame>
  );
}

function NoRecipes({ isFiltered, mayWrite }: { isFiltered: boolean; mayWrite: boolean }) {
  if (isFiltered) {
    return (
      <EmptyState title="No recipe fits these filters" action={<Button href="/recipes">Clear the filters</Button>} />
    );
  }
  return (
    <EmptyState
      title="No recipe yet"
      text="A recipe says at which resistances and test voltages a unit is checked, and how long each point may settle."
      note={mayWrite ? undefined : "An engineer writes and releases recipes."}
      action={
        mayWrite && (
          <Button href="/recipes/new" variant="main">
            Write the first one
          </Button>
        )
      }
    />
  );
}
