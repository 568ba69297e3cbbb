import type { SimulatedBenchOptions } from "@/drivers/simulated/simulated-bench";
import type { Repositories } from "@/lib/data/repositories";
import { BenchRoster, type RosterDependencies } from "@/lib/engine/bench-roster";
import { recoverBench } from "@/lib/engine/recovery";
import { ScaledClock } from "@/lib/engine/scaled-clock";
import type { Bench } from "@/lib/schemas/bench";
import { openBench } from "./open-bench";
import { simulationMemory } from "./simulation-memory";

/** How often an idle bench is looked after, in real milliseconds. */
const LOOK_AFTER_MS = 5000;

/**
 * Opens every bench of the register: each is made safe before anything else, then the run that an earlier process
 * left on it is taken over. Returns the roster and a function that shuts all of them down safely.
 */
export async function openBenches(
  dependencies: RosterDependencies,
): Promise<{ roster: BenchRoster; close: () => Promise<void> }> {
  const roster = new BenchRoster(dependencies);
  for (const bench of await dependencies.repositories.benches.list()) await openOne(bench, roster, dependencies);
  const timer = setInterval(() => {
    for (const manager of roster.managers()) {
      manager
        .lookAfter()
        .catch((error: unknown) => dependencies.onTrouble(`${manager.bench.name} could not be looked after`, error));
    }
  }, LOOK_AFTER_MS);
  const close = async () => {
    clearInterval(timer);
    await Promise.all(roster.managers().map((manager) => manager.shutDown()));
  };
  return { roster, close };
}

async function openOne(bench: Bench, roster: BenchRoster, dependencies: RosterDependencies): Promise<void> {
  const { repositories, feed, onTrouble, dataFolder } = dependencies;
  const memory: SimulatedBenchOptions["memory"] = simulationMemory(dataFolder, bench.id);
  const clock = new ScaledClock(await speedOfUnfinishedRun(bench, repositories));
  const { manager } = openBench({ bench, clock, roster, repositories, feed, onTrouble, memory });
  await openPorts(manager.devices.reopen(), bench, onTrouble);
  await recoverBench(manager, repositories);
}

/** A simulated run that is resumed goes on at the speed it was started with. */
async function speedOfUnfinishedRun(bench: Bench, { runs, journal }: Repositories): Promise<number> {
  const unfinished = bench.simulation ? await runs.activeOnBench(bench.id) : null;
  if (!unfinished) return 1;
  const [first] = await journal.records(unfinished.runId, { afterSeq: 0, limit: 1 });
  return first?.type === "run.started" ? first.data.clockSpeed : 1;
}

/** A bench whose ports can't be opened is shown with its trouble; the others go on. */
async function openPorts(
  opening: Promise<void>,
  bench: Bench,
  onTrouble: RosterDependencies["onTrouble"],
): Promise<void> {
  try {
    await opening;
  } catch (error) {
    onTrouble(`the ports of ${bench.name} could not be opened`, error);
  }
}
