import type { Repositories } from "@/lib/data/repositories";
import type { RunState } from "@/lib/journal/run-state";
import { isOver } from "@/lib/journal/selectors";
import { summariseRun } from "@/lib/journal/run-summary";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import type { Unit } from "@/lib/schemas/instrument";
import type { Actor } from "@/lib/schemas/person";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import type { Preflight, PreflightRequest, RunCommand, StartRun } from "@/lib/schemas/run";
import type { RunEvent, RunEventData } from "@/lib/schemas/run-event";
import type { BenchManager } from "./bench-manager";
import { EngineError } from "./engine-error";
import { runPreflight, type PreflightResult } from "./preflight";
import type { RunFeed } from "./run-feed";

export interface RosterBench {
  manager: BenchManager;
  /** Plugs a unit in on a simulated bench; hardware is connected by hand. */
  connectUnit: ((unit: Unit) => void) | null;
  /** Sets how fast a simulated bench's time runs; absent on hardware. */
  setSpeed: ((speed: number) => void) | null;
}

export interface RosterDependencies {
  repositories: Repositories;
  feed: RunFeed;
  dataFolder: string;
  appVersion: string;
  nowMs: () => number;
  onTrouble: (message: string, error: unknown) => void;
}

/** All benches of this host, and the way from a person's order to a run on one of them. */
export class BenchRoster {
  readonly #benches = new Map<string, RosterBench>();

  constructor(private readonly dependencies: RosterDependencies) {}

  add(bench: RosterBench): void {
    this.#benches.set(bench.manager.bench.id, bench);
  }

  managers(): BenchManager[] {
    return [...this.#benches.values()].map(({ manager }) => manager);
  }

  snapshots(): BenchSnapshot[] {
    return this.managers().map((manager) => manager.snapshot());
  }

  clockSpeed(benchId: string): number {
    return this.#bench(benchId).manager.clock.speed;
  }

  /** Live state of a run that is not over; null for any other. */
  liveState(runId: string): RunState | null {
    return this.#managerOf(runId)?.activeState ?? null;
  }

  /** Runs every check that a start would run. Switches nothing on. */
  async preflight(request: PreflightRequest): Promise<Preflight> {
    const { unit, recipe } = await this.#resolve(request);
    const bench = this.#bench(request.benchId);
    const { preflight } = await bench.manager.reserve(() => this.#check(bench, unit, recipe));
    return preflight;
  }

  /** Starts a run after a preflight of its own. The same `requestId` twice starts one run. */
  async start(order: StartRun, by: Actor): Promise<{ runId: string }> {
    const { repositories } = this.dependencies;
    const { unit, recipe } = await this.#resolve(order);
    const bench = this.#bench(order.benchId);
    const earlier = await repositories.commandsSeen.find(order.requestId);
    if (earlier) return { runId: earlier };
    return bench.manager.reserve(async () => {
      const checked = await this.#check(bench, unit, recipe);
      requireReady(checked.preflight, order.cautions);
      bench.setSpeed?.(order.clockSpeed);
      const runId = crypto.randomUUID();
      const runNumber = await repositories.runs.reserve({ runId, benchId: order.benchId, unitId: unit.id });
      await repositories.commandsSeen.claim(order.requestId, runId);
      await bench.manager.begin(runId, this.#setup({ order, by, unit, recipe, checked, runNumber, bench }));
      return { runId };
    });
  }

  /** Carries out a person's command once, however often it is sent. */
  async command(runId: string, command: RunCommand, by: Actor): Promise<void> {
    const { commandsSeen } = this.dependencies.repositories;
    if (command.kind === "stop") return this.#stop(runId, command, by);
    const isFirst = await commandsSeen.claim(command.id, runId);
    if (isFirst) await this.#requireActive(runId).command(runId, command, by);
  }

  /** A stop acts before its id is stored: an output that is on must not wait for the disk. */
  async #stop(runId: string, command: RunCommand, by: Actor): Promise<void> {
    const { commandsSeen } = this.dependencies.repositories;
    if (!this.#managerOf(runId) && (await commandsSeen.find(command.id))) return;
    await this.#requireActive(runId).command(runId, command, by);
    await commandsSeen.claim(command.id, runId);
  }

  #requireActive(runId: string): BenchManager {
    const manager = this.#managerOf(runId);
    if (!manager) throw new EngineError("not-active", "This run is over; there is nothing to command.");
    return manager;
  }

  /** Keeps lists in step with the journal and passes on what was committed. */
  committed(runId: string, records: RunEvent[], state: RunState): void {
    this.dependencies.feed.tellRecords(runId, records);
    if (!records.some((record) => changesSummary(record))) return;
    this.dependencies.repositories.runs
      .updateSummary(summariseRun(runId, state))
      .catch((error: unknown) =>
        this.dependencies.onTrouble(`the list entry of run ${runId} could not be brought up to date`, error),
      );
  }

  async #check(bench: RosterBench, unit: Unit, recipe: RecipeVersion): Promise<PreflightResult> {
    bench.connectUnit?.(unit);
    const { dataFolder, nowMs } = this.dependencies;
    return runPreflight({ manager: bench.manager, unit, recipe, dataFolder, nowMs: nowMs() });
  }

  async #resolve(request: PreflightRequest): Promise<{ unit: Unit; recipe: RecipeVersion }> {
    const { repositories } = this.dependencies;
    const [unit, recipe] = await Promise.all([
      repositories.units.get(request.unitId),
      repositories.recipes.getVersion(request.recipeVersionId),
    ]);
    if (!unit) throw new EngineError("register", "This unit is not in the register. Choose another.");
    if (!recipe) throw new EngineError("register", "This recipe does not exist. Choose another.");
    if (recipe.state !== "released") {
      throw new EngineError(
        "register",
        `Version ${recipe.version} of “${recipe.document.name}” is not released. Choose a released version.`,
      );
    }
    return { unit, recipe };
  }

  #setup(input: {
    order: StartRun;
    by: Actor;
    unit: Unit;
    recipe: RecipeVersion;
    checked: PreflightResult;
    runNumber: number;
    bench: RosterBench;
  }): RunEventData<"run.started"> {
    const { order, unit, recipe, checked, bench } = input;
    const { simulation: _physics, ...unitAsItIs } = unit;
    const { simulation: _circuit, ...benchAsItIs } = bench.manager.bench;
    return {
      runNumber: input.runNumber,
      recipe: { recipeId: recipe.recipeId, version: recipe.version, document: recipe.document },
      decisionRule: recipe.document.decisionRule,
      unit: unitAsItIs,
      bench: benchAsItIs,
      plan: checked.plan,
      condition: order.condition,
      room: checked.room ?? { celsius: bench.manager.bench.standard.referenceCelsius, humidityPercent: null },
      cautions: order.cautions,
      by: input.by,
      clockSpeed: bench.manager.clock.speed,
      appVersion: this.dependencies.appVersion,
    };
  }

  #bench(benchId: string): RosterBench {
    const bench = this.#benches.get(benchId);
    if (!bench) throw new EngineError("bench-unknown", "There is no such bench.");
    return bench;
  }

  #managerOf(runId: string): BenchManager | null {
    return this.managers().find((manager) => manager.activeRunId === runId) ?? null;
  }
}

function requireReady(preflight: Preflight, cautions: readonly string[]): void {
  const blocked = preflight.checks.filter((check) => check.state === "blocked");
  if (blocked.length > 0) {
    const findings = blocked.map((check) => `${check.title}: ${check.finding}`).join(" ");
    throw new EngineError("not-ready", `The bench is not ready. ${findings}`);
  }
  const unconfirmed = preflight.cautions.filter((caution) => !cautions.includes(caution));
  if (unconfirmed.length > 0) throw new EngineError("not-ready", `Confirm this first: ${unconfirmed[0]}`);
}

function changesSummary(record: RunEvent): boolean {
  return record.type.startsWith("run.") || record.type === "point.judged" || record.type === "point.skipped";
}

export function isActiveState(state: RunState): boolean {
  return state.status !== "empty" && !isOver(state.status);
}
