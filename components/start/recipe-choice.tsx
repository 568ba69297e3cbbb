"use client";

import type { Unit } from "@/lib/schemas/instrument";
import type { Plan } from "@/lib/schemas/plan";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { excludedGroups } from "@/components/recipe/excluded-groups";
import { countPoints } from "@/components/recipe/recipe-form";
import { forecastWords, recipesFor, recipeWords } from "./choice-words";
import { SearchChoice } from "./search-choice";

interface RecipeChoiceProps {
  recipes: readonly RecipeVersion[];
  unit: Unit | null;
  recipe: RecipeVersion | null;
  onChoose: (recipe: RecipeVersion | null) => void;
  /** Null until unit and recipe are chosen. */
  plan: Plan | null;
  clockSpeed: number;
}

/** The recipe, those of the unit's model first, with its points and its time. */
export function RecipeChoice({ recipes, unit, recipe, onChoose, plan, clockSpeed }: RecipeChoiceProps) {
  const { forModel, others } = recipesFor(unit, recipes);
  const groups = unit
    ? [
        { title: `For ${unit.model.maker} ${unit.model.model}`, items: forModel },
        { title: "For other models", items: others },
      ]
    : [{ title: "", items: others }];
  return (
    <div className="grid gap-1">
      <label htmlFor="recipe" className="text-[0.8125rem] leading-5 font-semibold">
        Recipe
      </label>
      <SearchChoice
        id="recipe"
        name="Recipe"
        describedBy="recipe-note"
        placeholder="Part of its name"
        groups={groups.filter(({ items }) => items.length > 0)}
        value={recipe}
        onChoose={onChoose}
        idOf={({ id }) => id}
        label={recipeWords}
        detail={describeRecipe}
        searchText={(entry) => `${recipeWords(entry)} ${entry.document.purpose}`}
        notice={recipes.length === 0 ? "No recipe has been released yet." : "No recipe has this in its name."}
      />
      <div id="recipe-note" className="min-h-4 text-label text-ink-2">
        {plan && recipe ? forecastWords(plan, clockSpeed) : recipe && "Choose the unit to see how long it takes."}
      </div>
      {plan && plan.excluded.length > 0 && <ExcludedPoints plan={plan} />}
    </div>
  );
}

function describeRecipe({ document }: RecipeVersion): string {
  const points = document.sections.reduce((sum, section) => sum + countPoints(section), 0);
  return `${points} points. ${document.purpose}`;
}

function ExcludedPoints({ plan }: { plan: Plan }) {
  const { length } = plan.excluded;
  return (
    <details className="text-label text-ink-2">
      <summary className="w-fit cursor-pointer text-water underline underline-offset-3 max-sm:py-2">
        {length === 1 ? "1 point is left out" : `${length} points are left out`}
      </summary>
      <ul className="mt-1 grid gap-1 border-l border-line pl-3">
        {excludedGroups(plan.excluded).map(({ cells, reason }) => (
          <li key={`${cells} ${reason}`}>
            <span className="text-ink">{cells}</span>: {reason}
          </li>
        ))}
      </ul>
    </details>
  );
}
