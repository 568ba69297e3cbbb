import type { Unit } from "@/lib/schemas/instrument";
import type { Plan } from "@/lib/schemas/plan";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { endedStatuses, type RunSummary } from "@/lib/schemas/run";
import type { RunCondition } from "@/lib/schemas/run-event";
import { formatDuration } from "@/lib/units/format";
import { countsInWords } from "@/components/runs-list/run-words";

/** A unit that ran within so many days has probably not been away. */
const RECENT_DAYS = 30;
const MS_PER_DAY = 86_400_000;

/** The unit as people call it: `Pellham IR-10, TW-0412`. */
export function unitWords({ model, assetNumber }: Unit): string {
  return `${model.maker} ${model.model}, ${assetNumber}`;
}

export function recipeWords({ document, version }: RecipeVersion): string {
  return `${document.name}, version ${version}`;
}

/** The latest run of a unit that is over; null when there is none among `runs`. */
export function lastRunOf(unitId: string, runs: readonly RunSummary[]): RunSummary | null {
  const ended = runs.filter((run) => run.unitId === unitId && endedStatuses.includes(run.status));
  return ended.reduce<RunSummary | null>(
    (last, run) => (last && last.startedAtMs > run.startedAtMs ? last : run),
    null,
  );
}

/** `Last run 2 Jun 2026, all 62 inside.` */
export function lastRunWords(run: RunSummary | null, formatDay: (atMs: number) => string): string {
  if (!run) return "No run of this unit yet.";
  return `Last run ${formatDay(run.startedAtMs)}, ${countsInWords(run.counts, run.status)}.`;
}

/** As found is proposed for a unit that has not run in the last 30 days: it has come in. */
export function proposedCondition(lastRun: RunSummary | null, nowMs: number): RunCondition {
  const isRecent = lastRun !== null && nowMs - lastRun.startedAtMs <= RECENT_DAYS * MS_PER_DAY;
  return isRecent ? "as-left" : "as-found";
}

/** `62 points, about 41 min`, and what that is by the wall clock when the bench's time runs faster. */
export function forecastWords(plan: Plan, clockSpeed: number): string {
  const { length } = plan.points;
  const seconds = plan.points.reduce((sum, point) => sum + point.forecastSeconds, 0);
  const count = length === 1 ? "1 point" : `${length} points`;
  const quick = clockSpeed > 1 ? `, at ${clockSpeed}× about ${formatDuration(seconds / clockSpeed)}` : "";
  return length === 0 ? "no point can be run" : `${count}, about ${formatDuration(seconds)}${quick}`;
}

export interface SortedRecipes {
  forModel: RecipeVersion[];
  others: RecipeVersion[];
}

/** Recipes made for the unit's model first; all of them as others while no unit is chosen. */
export function recipesFor(unit: Unit | null, recipes: readonly RecipeVersion[]): SortedRecipes {
  const isFor = (recipe: RecipeVersion) => unit !== null && recipe.modelIds.includes(unit.model.id);
  return { forModel: recipes.filter(isFor), others: recipes.filter((recipe) => !isFor(recipe)) };
}
