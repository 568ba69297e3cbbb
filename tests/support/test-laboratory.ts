import type { SimulatedBench } from "@/drivers/simulated/simulated-bench";
import { openBench } from "@/lib/composition/open-bench";
import { createRepositories } from "@/lib/data/create-repositories";
import { layDemoRegister } from "@/lib/data/demo/lay-demo-register";
import { openDatabase } from "@/lib/data/open-database";
import type { Repositories } from "@/lib/data/repositories";
import type { BenchManager } from "@/lib/engine/bench-manager";
import { BenchRoster } from "@/lib/engine/bench-roster";
import type { Clock } from "@/lib/engine/clock";
import { RunFeed } from "@/lib/engine/run-feed";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { saveRecipeSchema, type StartRun } from "@/lib/schemas/run";
import { temporaryDataFolder } from "./server-process";

export const actor = { id: "ines", name: "Ines Marlow" };
/** 1 December 2026, 08:00 UTC. */
export const START_MS = Date.UTC(2026, 11, 1, 8);

export interface TestLaboratory {
  repositories: Repositories;
  roster: BenchRoster;
  feed: RunFeed;
  clock: Clock;
  manager: BenchManager;
  simulated: SimulatedBench;
  troubles: string[];
  /** Adds a small released recipe. */
  addRecipe(section: object): Promise<RecipeVersion>;
  /** Starts a run on the bench with every caution confirmed. */
  start(recipe: RecipeVersion, assetNumber: string): Promise<string>;
  close(): Promise<void>;
}

/** One demo bench on a database of its own, in virtual time unless a clock is given. */
export async function openTestLaboratory(options: { benchName?: string; clock?: Clock } = {}): Promise<TestLaboratory> {
  const { dataFolder, remove } = temporaryDataFolder();
  const database = await openDatabase(dataFolder);
  const repositories = createRepositories(database);
  await layDemoRegister({ repositories, hashPassword: async () => "not a hash", nowMs: START_MS });
  const feed = new RunFeed();
  const troubles: string[] = [];
  const clock = options.clock ?? new VirtualClock({ startMs: START_MS });
  const onTrouble = (message: string, error: unknown) => troubles.push(`${message}: ${String(error)}`);
  const roster = new BenchRoster({
    repositories,
    feed,
    dataFolder,
    appVersion: "test",
    nowMs: () => START_MS,
    onTrouble,
  });
  const bench = (await repositories.benches.list()).find(({ name }) => name === (options.benchName ?? "North bench"))!;
  const { manager, simulated } = openBench({ bench, clock, roster, repositories, feed, onTrouble });
  return {
    repositories,
    roster,
    feed,
    clock,
    manager,
    simulated: simulated!,
    troubles,
    addRecipe: (section) => repositories.recipes.create(smallRecipe(section), "Tomas Reyl"),
    start: async (recipe, assetNumber) => startRun(roster, repositories, bench.id, recipe, assetNumber),
    close: async () => {
      await manager.shutDown();
      await database.close();
      remove();
    },
  };
}

function smallRecipe(section: object) {
  const rest = {
    kind: "resistance",
    excluded: [],
    readingsPerPoint: 2,
    order: "by-voltage",
    settling: { kind: "fixed", waitSeconds: 2 },
  };
  const document = {
    name: "Small check",
    purpose: "",
    sections: [{ ...rest, ...section }],
    decisionRule: { kind: "simple" },
  };
  return saveRecipeSchema.parse({ document, modelIds: [], release: true });
}

async function startRun(
  roster: BenchRoster,
  repositories: Repositories,
  benchId: string,
  recipe: RecipeVersion,
  assetNumber: string,
): Promise<string> {
  const [unit] = await repositories.units.list(assetNumber);
  const choice = { benchId, unitId: unit!.id, recipeVersionId: recipe.id };
  const { cautions } = await roster.preflight(choice);
  const order: StartRun = { ...choice, requestId: crypto.randomUUID(), condition: "as-found", cautions, clockSpeed: 1 };
  return (await roster.start(order, actor)).runId;
}
