import { applyRunEvent } from "@/lib/journal/apply-run-event";
import type { RunState } from "@/lib/journal/run-state";
import type { NewRunEvent, RunEvent } from "@/lib/schemas/run-event";
import type { Clock } from "./clock";
import { EngineError } from "./engine-error";

/** Readings are committed at once after a quiet spell, else gathered for so many real milliseconds. */
const GATHER_MS = 15;

export interface RecorderDependencies {
  runId: string;
  /** The state the run is in already: `emptyRun` for a new one, the folded journal for a resumed one. */
  state: RunState;
  clock: Clock;
  append: (runId: string, records: RunEvent[]) => Promise<void>;
  /** Called after each commit, with the state that the records led to. */
  onCommitted: (records: RunEvent[], state: RunState) => void;
}

/**
 * Numbers, times and commits the records of one run, and folds them into its live state.
 *
 * Commit, then tell: `state` and listeners move only after the database has the records.
 * Once a commit has failed the recorder refuses all further records, so that no gap can arise.
 */
export class RunRecorder {
  #state: RunState;
  #nextSeq: number;
  #elapsedAtOrigin: number;
  #origin: number;
  #pending: RunEvent[] = [];
  #flushing: Promise<void> | null = null;
  #cancelTimer: (() => void) | null = null;
  #lastFlushMs = -Infinity;
  #failure: EngineError | null = null;

  constructor(private readonly dependencies: RecorderDependencies) {
    this.#state = dependencies.state;
    this.#nextSeq = dependencies.state.lastSeq + 1;
    this.#elapsedAtOrigin = dependencies.state.elapsedMs;
    this.#origin = dependencies.clock.monotonicMs();
  }

  get runId(): string {
    return this.dependencies.runId;
  }

  /** The run as committed so far. */
  get state(): RunState {
    return this.#state;
  }

  /** Run time in milliseconds: monotonic, and standing still while no process served the run. */
  get elapsedMs(): number {
    return this.#elapsedAtOrigin + this.dependencies.clock.monotonicMs() - this.#origin;
  }

  /** Puts a record in line; it is committed within a fraction of a second, in order. */
  note(event: NewRunEvent): RunEvent {
    if (this.#failure) throw this.#failure;
    const stamp = {
      seq: this.#nextSeq++,
      atMs: this.dependencies.clock.nowMs(),
      elapsedMs: Math.round(this.elapsedMs),
    };
    const record = { ...stamp, ...event } as RunEvent;
    this.#pending.push(record);
    this.#armTimer();
    return record;
  }

  /** Puts a record in line and resolves when it, and all before it, are committed. */
  async record(event: NewRunEvent): Promise<void> {
    this.note(event);
    await this.commit();
  }

  /** Resolves when every record noted so far is committed. Throws EngineError `storage` when the database refuses. */
  async commit(): Promise<void> {
    this.#cancelTimer?.();
    this.#cancelTimer = null;
    while (this.#flushing || this.#pending.length > 0) {
      this.#flushing ??= this.#flush().finally(() => {
        this.#flushing = null;
      });
      await this.#flushing;
    }
    if (this.#failure) throw this.#failure;
  }

  #armTimer(): void {
    if (this.#cancelTimer || this.#flushing) return;
    const waitMs = Math.max(0, this.#lastFlushMs + GATHER_MS - performance.now());
    const timer = setTimeout(() => {
      this.#cancelTimer = null;
      // A failed commit is kept in #failure and met by the next record.
      this.commit().catch(() => undefined);
    }, waitMs);
    this.#cancelTimer = () => clearTimeout(timer);
  }

  async #flush(): Promise<void> {
    const records = this.#pending;
    this.#pending = [];
    if (records.length === 0) return;
    this.#lastFlushMs = performance.now();
    try {
      await this.dependencies.clock.hold(this.dependencies.append(this.runId, records));
    } catch (cause) {
      this.#failure = new EngineError(
        "storage",
        `Records ${records[0]!.seq} to ${records.at(-1)!.seq} of the run could not be stored. Free disk space and check the data folder, then restart Stepwell.`,
        { cause },
      );
      this.#pending = [];
      throw this.#failure;
    }
    this.#state = records.reduce(applyRunEvent, this.#state);
    this.dependencies.onCommitted(records, this.#state);
  }
}
