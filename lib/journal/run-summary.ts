import type { RunStatus, RunSummary } from "@/lib/schemas/run";
import type { RunState } from "./run-state";
import { stairGroups, verdictCounts } from "./selectors";

/** The run as a row of a list. Throws RangeError for a state without a start. */
export function summariseRun(runId: string, state: RunState): RunSummary {
  const { setup, startedAtMs, status } = state;
  if (!setup || startedAtMs === null || status === "empty") throw new RangeError(`run ${runId} has not started`);
  return {
    id: runId,
    number: setup.runNumber,
    status: status as RunStatus,
    benchId: setup.bench.id,
    benchName: setup.bench.name,
    unitId: setup.unit.id,
    unitName: `${setup.unit.model.maker} ${setup.unit.model.model}`,
    assetNumber: setup.unit.assetNumber,
    recipeId: setup.recipe.recipeId,
    recipeName: setup.recipe.document.name,
    recipeVersion: setup.recipe.version,
    condition: setup.condition,
    startedBy: setup.by.name,
    startedAtMs,
    endedAtMs: state.endedAtMs,
    counts: verdictCounts(state),
    stairs: stairGroups(state),
  };
}
