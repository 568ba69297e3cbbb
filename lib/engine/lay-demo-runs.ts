import type { Repositories } from "@/lib/data/repositories";
import type { Bench } from "@/lib/schemas/bench";
import type { Unit } from "@/lib/schemas/instrument";
import type { Actor } from "@/lib/schemas/person";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import type { RunCondition } from "@/lib/schemas/run-event";
import type { BenchRoster } from "./bench-roster";

/** One run of the demo laboratory's past. */
export interface DemoRun {
  benchName: string;
  assetNumber: string;
  recipeName: string;
  condition: RunCondition;
  startedBy: string;
  daysAgo: number;
  /** Hour and minute of the start, UTC. */
  at: readonly [hour: number, minute: number];
  /** Ends the run by hand after so many bench minutes, as happens. */
  stoppedAfterMinutes?: number;
}

export interface LayDemoRunsInput {
  repositories: Repositories;
  runs: readonly DemoRun[];
  nowMs: number;
  /** A roster with one simulated bench whose virtual time begins at `startMs`, and the way to close it. */
  openBench: (
    bench: Bench,
    startMs: number,
  ) => Promise<{ roster: BenchRoster; waitMinutes: (minutes: number) => Promise<void>; close: () => Promise<void> }>;
}

const DAY_MS = 86_400_000;

/** Makes the demo laboratory's past by really running the engine on the simulated benches, in virtual time, oldest first. */
export async function layDemoRuns(input: LayDemoRunsInput): Promise<number> {
  const { repositories } = input;
  const [benches, units, recipes, people] = await Promise.all([
    repositories.benches.list(),
    repositories.units.list(""),
    repositories.recipes.listReleased(),
    repositories.people.list(),
  ]);
  const oldestFirst = [...input.runs].sort((a, b) => b.daysAgo - a.daysAgo || a.at[0] - b.at[0]);
  for (const run of oldestFirst) {
    await layRun(input, run, {
      bench: required(
        benches.find(({ name }) => name === run.benchName),
        `bench ${run.benchName}`,
      ),
      unit: required(
        units.find(({ assetNumber }) => assetNumber === run.assetNumber),
        `unit ${run.assetNumber}`,
      ),
      recipe: required(
        recipes.find(({ document }) => document.name === run.recipeName),
        `recipe ${run.recipeName}`,
      ),
      by: required(
        people.find(({ name }) => name === run.startedBy),
        `person ${run.startedBy}`,
      ),
    });
  }
  return oldestFirst.length;
}

async function layRun(
  { openBench, nowMs }: LayDemoRunsInput,
  run: DemoRun,
  { bench, unit, recipe, by }: { bench: Bench; unit: Unit; recipe: RecipeVersion; by: Actor },
): Promise<void> {
  const startMs = startOf(nowMs, run);
  const { roster, waitMinutes, close } = await openBench(bench, startMs);
  try {
    const manager = required(roster.managers()[0], "the opened bench");
    await manager.makeSafe();
    const choice = { benchId: bench.id, unitId: unit.id, recipeVersionId: recipe.id };
    const { cautions } = await roster.preflight(choice);
    const order = { ...choice, requestId: crypto.randomUUID(), condition: run.condition, cautions, clockSpeed: 1 };
    const { runId } = await roster.start(order, { id: by.id, name: by.name });
    if (run.stoppedAfterMinutes) {
      await waitMinutes(run.stoppedAfterMinutes);
      const stop = { id: crypto.randomUUID(), kind: "stop" as const, reason: "bench needed for another unit" };
      await roster.command(runId, stop, { id: by.id, name: by.name });
    }
    await manager.settled();
  } finally {
    await close();
  }
}

function startOf(nowMs: number, { daysAgo, at: [hour, minute] }: DemoRun): number {
  const midnight = Math.floor(nowMs / DAY_MS) * DAY_MS;
  return midnight - daysAgo * DAY_MS + (hour * 60 + minute) * 60_000;
}

function required<T>(value: T | undefined, what: string): T {
  if (value === undefined) throw new RangeError(`the demo laboratory has no ${what}`);
  return value;
}
