"use client";

import { failureMessage } from "@/lib/client/api-error";
import { useBench } from "@/lib/client/use-bench";
import type { Bench, BenchSnapshot } from "@/lib/schemas/bench";
import type { Unit } from "@/lib/schemas/instrument";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { BusyNote } from "./busy-note";
import { Cautions } from "./cautions";
import { ConditionChoice } from "./condition-choice";
import { missingToStart } from "./missing-to-start";
import { PreflightPanel } from "./preflight-panel";
import { RecipeChoice } from "./recipe-choice";
import { RoomReading } from "./room-reading";
import { SimulatedTime } from "./simulated-time";
import { StartButton } from "./start-button";
import { UnitChoice } from "./unit-choice";
import { useStartChoices } from "./use-start-choices";
import { useStartRun } from "./use-start-run";

export interface StartFormProps {
  bench: Bench;
  snapshot: BenchSnapshot | null;
  recipes: readonly RecipeVersion[];
  /** Choices that a link brought along. */
  given: { unit: Unit | null; recipe: RecipeVersion | null };
}

/** Choices and cautions left, preflight right, and one button that says what is missing. */
export function StartForm({ bench, snapshot, recipes, given }: StartFormProps) {
  const present = useBench(bench.id, snapshot);
  const start = useStartRun();
  const isLeaving = start.isPending || start.isSuccess;
  const activeRunId = isLeaving ? null : (present?.activeRunId ?? null);
  const choices = useStartChoices({ bench, given, room: present?.room ?? null, isPaused: isLeaving || !!activeRunId });
  const { unit, recipe, preflight, plan, cautions, ticked } = choices;
  const missing = activeRunId
    ? "The bench is busy."
    : missingToStart({
        hasUnit: unit !== null,
        hasRecipe: recipe !== null,
        preflight: choices.preflightState,
        blocked: preflight.data?.checks.flatMap(({ state, title }) => (state === "blocked" ? [title] : [])) ?? [],
        ticked: cautions.map((caution) => ticked.has(caution)),
      });

  return (
    <form
      className="grid items-start gap-5 lg:grid-cols-2"
      onSubmit={(event) => {
        event.preventDefault();
        if (missing === null && choices.order && !isLeaving) start.mutate(choices.order);
      }}
    >
      <div className="grid gap-3.5">
        {activeRunId && <BusyNote benchName={bench.name} runId={activeRunId} />}
        <UnitChoice unit={unit} onChoose={choices.chooseUnit} lastRun={choices.lastRun} />
        <RecipeChoice
          recipes={recipes}
          unit={unit}
          recipe={recipe}
          onChoose={choices.chooseRecipe}
          plan={plan}
          clockSpeed={choices.clockSpeed}
        />
        <div className="grid gap-4 sm:grid-cols-2">
          <ConditionChoice condition={choices.condition} onChoose={choices.chooseCondition} />
          <RoomReading room={choices.room} />
        </div>
        {bench.simulation && <SimulatedTime speed={choices.clockSpeed} onChoose={choices.chooseClockSpeed} />}
        <Cautions plan={plan} cautions={cautions} ticked={ticked} onTick={choices.tick} />
      </div>
      <PreflightPanel
        benchName={bench.name}
        isChosen={unit !== null && recipe !== null}
        preflight={preflight.data}
        madeAtMs={preflight.dataUpdatedAt}
        isChecking={preflight.isFetching}
        error={preflight.error}
        onAgain={() => void preflight.refetch()}
      >
        <StartButton
          missing={missing}
          isStarting={isLeaving}
          failure={start.error ? failureMessage(start.error) : null}
        />
      </PreflightPanel>
    </form>
  );
}
