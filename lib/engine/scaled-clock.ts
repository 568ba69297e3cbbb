import { abortableSleep } from "./abortable-sleep";
import type { Clock } from "./clock";

const LOWEST_SPEED = 1;
const HIGHEST_SPEED = 1000;
/** setTimeout takes no longer delay than this. */
const LONGEST_TIMER_MS = 2 ** 31 - 1;

interface Wake {
  atMs: number;
  callback: () => void;
  timer: NodeJS.Timeout | undefined;
}

/** The machine's own time, 1 to 1000 times as fast. Hardware runs at 1. */
export class ScaledClock implements Clock {
  #speed: number;
  #realOrigin = performance.now();
  #benchOrigin = 0;
  readonly #wakes = new Set<Wake>();

  /** Throws RangeError for a speed outside 1 to 1000. */
  constructor(speed = 1) {
    this.#speed = checkedSpeed(speed);
  }

  get speed(): number {
    return this.#speed;
  }

  /** Changes the speed; bench time goes on without a jump. Throws RangeError for a speed outside 1 to 1000. */
  setSpeed(speed: number): void {
    const checked = checkedSpeed(speed);
    this.#benchOrigin = this.monotonicMs();
    this.#realOrigin = performance.now();
    this.#speed = checked;
    for (const wake of this.#wakes) this.#arm(wake);
  }

  nowMs(): number {
    return Date.now();
  }

  monotonicMs(): number {
    return this.#benchOrigin + (performance.now() - this.#realOrigin) * this.#speed;
  }

  sleep(ms: number, signal?: AbortSignal): Promise<void> {
    return abortableSleep(this, ms, signal);
  }

  schedule(ms: number, callback: () => void): () => void {
    const wake: Wake = { atMs: this.monotonicMs() + ms, callback, timer: undefined };
    this.#wakes.add(wake);
    this.#arm(wake);
    return () => this.#drop(wake);
  }

  deadline(ms: number, callback: () => void): () => void {
    const timer = setTimeout(callback, Math.min(LONGEST_TIMER_MS, Math.max(0, ms)));
    return () => clearTimeout(timer);
  }

  /** Real time can't be held: the work is awaited as it is. */
  hold<T>(work: Promise<T>): Promise<T> {
    return work;
  }

  /** A timer may be early by part of a millisecond, which is long in fast time: what is not due is armed again. */
  #arm(wake: Wake): void {
    clearTimeout(wake.timer);
    const realMs = Math.max(0, wake.atMs - this.monotonicMs()) / this.#speed;
    wake.timer = setTimeout(() => this.#ring(wake), Math.min(LONGEST_TIMER_MS, realMs));
  }

  #ring(wake: Wake): void {
    if (this.monotonicMs() < wake.atMs) return this.#arm(wake);
    this.#wakes.delete(wake);
    wake.callback();
  }

  #drop(wake: Wake): void {
    clearTimeout(wake.timer);
    this.#wakes.delete(wake);
  }
}

function checkedSpeed(speed: number): number {
  if (speed >= LOWEST_SPEED && speed <= HIGHEST_SPEED) return speed;
  throw new RangeError(`a clock runs at ${LOWEST_SPEED} to ${HIGHEST_SPEED} times, got ${speed}`);
}
