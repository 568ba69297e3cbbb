import { useMemo, useState } from "react";
import { planRun } from "@/lib/planning/plan";
import { cautionsFor } from "@/lib/planning/preflight-checks";
import type { Bench, Room } from "@/lib/schemas/bench";
import type { Unit } from "@/lib/schemas/instrument";
import type { Plan } from "@/lib/schemas/plan";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import type { RunCondition } from "@/lib/schemas/run-event";
import { proposedCondition } from "./choice-words";
import type { StartReadiness } from "./missing-to-start";
import { USUAL_SPEED } from "./simulated-time";
import { useLastRun } from "./use-last-run";
import { usePreflight } from "./use-preflight";
import type { StartOrder } from "./use-start-run";

interface ChoicesInput {
  bench: Bench;
  given: { unit: Unit | null; recipe: RecipeVersion | null };
  /** The bench's latest reading of its room. */
  room: Room | null;
  /** No preflight while a run is being started or another one is on the bench. */
  isPaused: boolean;
}

/** Everything a person chooses before a start, and what follows from it. */
export function useStartChoices({ bench, given, room, isPaused }: ChoicesInput) {
  const [unit, setUnit] = useState(given.unit);
  const [recipe, chooseRecipe] = useState(given.recipe);
  const [chosenCondition, chooseCondition] = useState<{ unit: Unit | null; condition: RunCondition } | null>(null);
  const [clockSpeed, chooseClockSpeed] = useState(bench.simulation ? USUAL_SPEED : 1);
  const [ticked, setTicked] = useState<ReadonlySet<string>>(new Set());

  const lastRun = useLastRun(unit);
  const request = unit && recipe ? { benchId: bench.id, unitId: unit.id, recipeVersionId: recipe.id } : null;
  const preflight = usePreflight(request, isPaused);
  const presentRoom = preflight.data?.room ?? room;
  const plan = usePlan({ bench, unit, recipe, room: presentRoom });
  const cautions = preflight.data?.cautions ?? (plan ? cautionsFor(plan) : []);
  const proposed = lastRun.data ? proposedCondition(lastRun.data.run, lastRun.data.askedAtMs) : "as-found";
  const condition = chosenCondition?.unit === unit ? chosenCondition.condition : proposed;
  const order: StartOrder | null = request && {
    ...request,
    condition,
    cautions: cautions.filter((caution) => ticked.has(caution)),
    clockSpeed,
  };

  return {
    ...{ unit, recipe, chooseRecipe, clockSpeed, chooseClockSpeed, condition, ticked },
    ...{ preflight, plan, cautions, order, room: presentRoom, lastRun: lastRun.data?.run },
    preflightState: preflightState(request !== null, preflight),
    chooseUnit: (chosen: Unit | null) => {
      // With another unit the leads have been moved: nothing that was confirmed still holds.
      setUnit(chosen);
      setTicked(new Set());
    },
    chooseCondition: (chosen: RunCondition) => chooseCondition({ unit, condition: chosen }),
    tick: (caution: string, isTicked: boolean) => setTicked((known) => withTick(known, caution, isTicked)),
  };
}

function usePlan({
  bench,
  unit,
  recipe,
  room,
}: Omit<ChoicesInput, "given" | "isPaused"> & {
  unit: Unit | null;
  recipe: RecipeVersion | null;
}): Plan | null {
  const celsius = room?.celsius ?? bench.standard.referenceCelsius;
  return useMemo(() => {
    if (!unit || !recipe) return null;
    return planRun({ document: recipe.document, bench, model: unit.model, room: { celsius, humidityPercent: null } });
  }, [bench, unit, recipe, celsius]);
}

function preflightState(
  isAsked: boolean,
  { data, error }: { data: unknown; error: Error | null },
): StartReadiness["preflight"] {
  if (!isAsked) return "none";
  if (error) return "failed";
  return data ? "ready" : "checking";
}

function withTick(known: ReadonlySet<string>, caution: string, isTicked: boolean): ReadonlySet<string> {
  const next = new Set(known);
  if (isTicked) next.add(caution);
  else next.delete(caution);
  return next;
}
