import type { Passwords } from "@/lib/auth/passwords";
import { layDemoRegister } from "@/lib/data/demo/lay-demo-register";
import { BenchRoster, type RosterDependencies } from "@/lib/engine/bench-roster";
import { layDemoRuns } from "@/lib/engine/lay-demo-runs";
import { RunFeed } from "@/lib/engine/run-feed";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import { demoRuns } from "./demo-runs";
import { openBench } from "./open-bench";
import { whileLaying } from "./open-data";

/** Lays the demo laboratory in an empty database: its register, and with `withRuns` its past. */
export async function layDemo(
  dependencies: RosterDependencies,
  passwords: Passwords,
  withRuns: boolean,
): Promise<void> {
  const { repositories } = dependencies;
  if ((await repositories.people.count()) > 0) return;
  const nowMs = dependencies.nowMs();
  await whileLaying(repositories, async () => {
    await layDemoRegister({ repositories, hashPassword: (password) => passwords.hash(password), nowMs });
    if (withRuns) await layPast(dependencies, nowMs);
  });
}

async function layPast(dependencies: RosterDependencies, nowMs: number): Promise<void> {
  const { repositories } = dependencies;
  await layDemoRuns({
    repositories,
    runs: demoRuns,
    nowMs,
    openBench: async (bench, startMs) => {
      const clock = new VirtualClock({ startMs });
      // Nobody watches the past being laid.
      const feed = new RunFeed();
      const roster = new BenchRoster({ ...dependencies, feed, nowMs: () => clock.nowMs() });
      const { manager } = openBench({ ...dependencies, bench, clock, roster, feed });
      await manager.devices.reopen();
      return { roster, waitMinutes: (minutes) => clock.sleep(minutes * 60_000), close: () => manager.shutDown() };
    },
  });
}
