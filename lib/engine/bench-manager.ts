import type { BenchDevices } from "@/drivers/bench-devices";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import { allowedCommands, isOver, nextPoint } from "@/lib/journal/selectors";
import type { Bench, BenchSnapshot, OutputState, Room } from "@/lib/schemas/bench";
import type { Actor } from "@/lib/schemas/person";
import type { RunCommand } from "@/lib/schemas/run";
import type { RunEvent, RunEventData, Trouble } from "@/lib/schemas/run-event";
import type { Clock } from "./clock";
import { EngineError } from "./engine-error";
import { RunControl, type Interruption } from "./run-control";
import { RunRecorder } from "./run-recorder";
import { SafeState } from "./safe-state";
import { describeTrouble, runSequence } from "./sequencer";

export interface BenchManagerDependencies {
  bench: Bench;
  clock: Clock;
  devices: BenchDevices;
  append: (runId: string, records: RunEvent[]) => Promise<void>;
  /** Told after each commit; `snapshot` is the bench as it is then. */
  onCommitted: (runId: string, records: RunEvent[], state: RunState) => void;
  onSnapshot: (snapshot: BenchSnapshot) => void;
  /** Trouble that no journal could take. */
  onTrouble: (message: string, error: unknown) => void;
}

interface ActiveRun {
  recorder: RunRecorder;
  control: RunControl;
  /** Settles when the sequencer has ended; null while the run is held, faulted or interrupted. */
  sequence: Promise<void> | null;
}

/** Owns one bench: its devices, its safe state and the one run that may be on it. */
export class BenchManager {
  readonly safeState: SafeState;
  #active: ActiveRun | null = null;
  #idleOutput: OutputState = { state: "unknown", volts: null };
  #room: Room | null = null;
  #trouble: string | null = null;
  /** The device work of one caller after the other. */
  #turn: Promise<unknown> = Promise.resolve();
  #waiting = 0;

  constructor(private readonly dependencies: BenchManagerDependencies) {
    this.safeState = new SafeState(dependencies.devices, dependencies.bench, dependencies.clock);
  }

  get bench(): Bench {
    return this.dependencies.bench;
  }

  get devices(): BenchDevices {
    return this.dependencies.devices;
  }

  get clock(): Clock {
    return this.dependencies.clock;
  }

  /** The run that is not over; null on a free bench. */
  get activeState(): RunState | null {
    return this.#active?.recorder.state ?? null;
  }

  get activeRunId(): string | null {
    return this.#active?.recorder.runId ?? null;
  }

  /** A run is being started or measured: its devices are not to be touched. */
  get isBusy(): boolean {
    return this.#waiting > 0 || (this.#active?.sequence ?? null) !== null;
  }

  snapshot(): BenchSnapshot {
    const { bench } = this.dependencies;
    return {
      id: bench.id,
      name: bench.name,
      roomName: bench.room,
      room: this.#room,
      simulated: bench.simulation !== null,
      activeRunId: this.activeRunId,
      output: this.#active?.sequence ? this.#active.recorder.state.output : this.#idleOutput,
      trouble: this.#trouble,
    };
  }

  /** Brings the idle bench to the safe state and keeps what it found. Never throws: unknown is told as unknown. */
  async makeSafe(): Promise<Trouble | null> {
    try {
      const permit = await this.safeState.reach();
      this.#idleOutput = { state: "off", volts: permit.terminalVolts };
      this.#trouble = null;
      return null;
    } catch (error) {
      const trouble = describeTrouble(error);
      this.#idleOutput = { state: "unknown", volts: null };
      this.#trouble = `${trouble.message} ${trouble.cure}`.trim();
      return trouble;
    } finally {
      this.#tell();
    }
  }

  /** Looks after an idle bench: lost ports are opened again, the output is proven off, the room is read. */
  async lookAfter(): Promise<void> {
    if (this.isBusy) return;
    await this.#exclusive(async () => {
      if (this.#active?.sequence) return;
      try {
        await this.devices.reopen();
        const trouble = await this.makeSafe();
        if (!trouble) await this.readRoom();
      } catch (error) {
        const trouble = describeTrouble(error);
        this.#trouble = `${trouble.message} ${trouble.cure}`.trim();
      }
      this.#tell();
    });
  }

  async readRoom(): Promise<Room> {
    this.#room = await this.dependencies.devices.roomSensor.read();
    return this.#room;
  }

  /**
   * Keeps the free bench for one caller while `act` runs; callers wait for each other.
   * Throws EngineError `bench-busy` when a run is on it.
   */
  reserve<T>(act: () => Promise<T>): Promise<T> {
    return this.#exclusive(() => {
      if (this.#active) throw this.#busy();
      return act();
    });
  }

  /** Begins a run on a bench that the caller has reserved. Resolves when `run.started` is committed. */
  async begin(runId: string, setup: RunEventData<"run.started">): Promise<void> {
    const active = this.#activate(runId, emptyRun);
    try {
      await active.recorder.record({ type: "run.started", data: setup });
    } catch (error) {
      this.#active = null;
      throw error;
    }
    this.#launch(active);
  }

  /** Takes over a run that an earlier process left unfinished, without switching anything on. */
  adopt(runId: string, state: RunState): RunRecorder {
    return this.#activate(runId, state).recorder;
  }

  /** Resolves when no sequence is under way: the run is over, held, faulted or interrupted. */
  async settled(): Promise<void> {
    await this.#active?.sequence;
  }

  /** Carries out a person's command. Throws EngineError when the run is not active here or the command means nothing now. */
  async command(runId: string, command: RunCommand, by: Actor): Promise<void> {
    const active = this.#active;
    if (!active || active.recorder.runId !== runId) {
      throw new EngineError("not-active", "This run is over; there is nothing to command.");
    }
    const { state } = active.recorder;
    if (!allowedCommands(state).includes(command.kind)) {
      throw new EngineError("not-allowed-now", `A run that is ${state.status} can't be told to ${command.kind}.`);
    }
    if (command.kind === "resume") return this.#resume(active, by);
    const wish = { kind: command.kind, by, reason: command.reason };
    return active.sequence ? this.#interrupt(active, wish) : this.#endIdle(active, wish);
  }

  /** Tells the journal of trouble that a repetition has cured. */
  noteRecovery(recovery: { device: string; message: string; tries: number }): void {
    if (this.#active?.sequence) this.#active.recorder.note({ type: "device.recovered", data: recovery });
  }

  /** Ends the present attempt and leaves the run interrupted, resumable after the next start. */
  async shutDown(): Promise<void> {
    const active = this.#active;
    const by = { id: "stepwell", name: "Stepwell" };
    if (active?.sequence) {
      await this.#interrupt(active, { kind: "shutdown", by, reason: "Stepwell was shut down; the output is off." });
    } else await this.makeSafe();
    await this.dependencies.devices.close();
  }

  #activate(runId: string, state: RunState): ActiveRun {
    const recorder = new RunRecorder({
      runId,
      state,
      clock: this.dependencies.clock,
      append: this.dependencies.append,
      onCommitted: (records, after) => this.#committed(runId, records, after),
    });
    this.#active = { recorder, control: new RunControl(), sequence: null };
    return this.#active;
  }

  #committed(runId: string, records: RunEvent[], state: RunState): void {
    if (isOver(state.status) && this.#active?.recorder.runId === runId) {
      this.#idleOutput = state.output;
      this.#active = null;
    }
    this.dependencies.onCommitted(runId, records, state);
    if (records.some((record) => record.type !== "reading.taken")) this.#tell();
  }

  #launch(active: ActiveRun): void {
    const { devices, clock } = this.dependencies;
    const { recorder, control } = active;
    const setup = recorder.state.setup!;
    const sequence = runSequence({ setup, devices, safeState: this.safeState, recorder, clock, control })
      .catch((error: unknown) => this.#journalFailed(error))
      .finally(() => {
        active.sequence = null;
        this.#idleOutput = recorder.state.output;
        this.#tell();
      });
    active.sequence = sequence;
    this.#tell();
  }

  #journalFailed(error: unknown): void {
    this.#trouble = describeTrouble(error).message;
    this.dependencies.onTrouble(`the journal of ${this.bench.name} could not be written`, error);
  }

  async #interrupt(active: ActiveRun, wish: Interruption): Promise<void> {
    active.control.interrupt(wish);
    // Off at once and past the queue; the sequencer proves it on its way to the safe state.
    await this.devices.tester.switchOff().catch((error: unknown) => this.dependencies.onTrouble("urgent off", error));
    if (wish.kind !== "skip") await active.sequence;
  }

  async #endIdle({ recorder }: ActiveRun, wish: Interruption): Promise<void> {
    if (wish.kind === "skip") {
      const point = nextPoint(recorder.state);
      if (point !== null) await recorder.record({ type: "point.skipped", data: { point, by: wish.by } });
      return;
    }
    const trouble = await this.makeSafe();
    if (trouble) recorder.note({ type: "output.unproven", data: { reason: trouble.message } });
    else recorder.note({ type: "output.off-proven", data: { terminalVolts: this.#idleOutput.volts ?? 0 } });
    await recorder.record({ type: "run.stopped", data: { by: wish.by, reason: wish.reason } });
  }

  #resume(active: ActiveRun, by: Actor): Promise<void> {
    return this.#exclusive(async () => {
      await this.devices.reopen();
      await this.#proveSameUnit(active);
      const trouble = await this.makeSafe();
      if (trouble) throw new EngineError("not-ready", `${trouble.message} ${trouble.cure}`);
      const room = await this.readRoom();
      await active.recorder.record({ type: "run.resumed", data: { by, room } });
      active.control.answer();
      this.#launch(active);
    });
  }

  /** After a lost port another instrument may answer under the old name. */
  async #proveSameUnit({ recorder }: ActiveRun): Promise<void> {
    const expected = recorder.state.setup!.unit.serialNumber;
    const { serialNumber } = await this.devices.tester.identify();
    if (serialNumber === expected) return;
    throw new EngineError(
      "not-ready",
      `The tester that answers has serial number ${serialNumber}; this run is of ${expected}. Connect the unit of this run, then resume.`,
    );
  }

  #exclusive<T>(act: () => Promise<T>): Promise<T> {
    this.#waiting += 1;
    const done = this.#turn.then(act).finally(() => {
      this.#waiting -= 1;
    });
    // The next caller's turn comes whether this one succeeds or fails.
    this.#turn = done.catch(() => undefined);
    return done;
  }

  #tell(): void {
    this.dependencies.onSnapshot(this.snapshot());
  }

  #busy(): EngineError {
    return new EngineError(
      "bench-busy",
      `${this.bench.name} is in use. Wait until its run is over, or stop that run first.`,
    );
  }
}
