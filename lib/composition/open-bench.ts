import { openBenchDevices } from "@/drivers/open-bench-devices";
import { SimulatedBench, type SimulatedBenchOptions } from "@/drivers/simulated/simulated-bench";
import { BenchManager } from "@/lib/engine/bench-manager";
import type { BenchRoster } from "@/lib/engine/bench-roster";
import type { Clock } from "@/lib/engine/clock";
import type { RunFeed } from "@/lib/engine/run-feed";
import { ScaledClock } from "@/lib/engine/scaled-clock";
import { checkRating } from "@/lib/metrology/ratings";
import type { Repositories } from "@/lib/data/repositories";
import type { Bench } from "@/lib/schemas/bench";

export interface OpenBenchOptions {
  bench: Bench;
  clock: Clock;
  roster: BenchRoster;
  repositories: Repositories;
  feed: RunFeed;
  onTrouble: (message: string, error: unknown) => void;
  memory?: SimulatedBenchOptions["memory"];
}

export interface OpenedBench {
  manager: BenchManager;
  simulated: SimulatedBench | null;
}

/** Builds one bench from its description, devices and simulation included, and adds it to the roster. Its ports are still closed. */
export function openBench({
  bench,
  clock,
  roster,
  repositories,
  feed,
  onTrouble,
  memory,
}: OpenBenchOptions): OpenedBench {
  const simulated = bench.simulation ? new SimulatedBench({ bench, clock, ...(memory ? { memory } : {}) }) : null;
  const devices = openBenchDevices({
    bench,
    clock,
    checkRating: (positions, highestVolts) => checkRating(bench.standard, positions, highestVolts),
    onRecovered: (recovery) => manager.noteRecovery(recovery),
    binding: simulated?.binding,
  });
  const manager = new BenchManager({
    bench,
    clock,
    devices,
    append: (runId, records) => repositories.journal.append(runId, records),
    onCommitted: (runId, records, state) => roster.committed(runId, records, state),
    onSnapshot: (snapshot) => feed.tellBench(snapshot),
    onTrouble,
  });
  roster.add({
    manager,
    connectUnit: simulated && ((unit) => simulated.connectUnit(unit)),
    setSpeed: simulated && clock instanceof ScaledClock ? (speed) => clock.setSpeed(speed) : null,
  });
  return { manager, simulated };
}
