import { abortableSleep } from "./abortable-sleep";
import type { Clock } from "./clock";

interface Wake {
  atMs: number;
  order: number;
  callback: () => void;
  isCancelled: boolean;
}

/** Turns of the event loop without new work after which everything waits for time. */
const QUIET_TURNS = 3;

/**
 * Time that passes only when everything waits for it: the clock jumps to the next wake-up once the event loop has been
 * quiet for a few turns and no real work is held. A run of an hour takes seconds, and takes the same course each time.
 */
export class VirtualClock implements Clock {
  readonly speed = 1;
  readonly #startMs: number;
  #elapsedMs = 0;
  #order = 0;
  #holds = 0;
  #isTurning = false;
  #quietTurns = 0;
  readonly #heap: Wake[] = [];

  constructor({ startMs }: { startMs: number }) {
    this.#startMs = startMs;
  }

  nowMs(): number {
    return this.#startMs + Math.round(this.#elapsedMs);
  }

  monotonicMs(): number {
    return this.#elapsedMs;
  }

  sleep(ms: number, signal?: AbortSignal): Promise<void> {
    return abortableSleep(this, ms, signal);
  }

  schedule(ms: number, callback: () => void): () => void {
    const wake = { atMs: this.#elapsedMs + Math.max(0, ms), order: this.#order++, callback, isCancelled: false };
    this.#push(wake);
    this.#turn();
    return () => {
      wake.isCancelled = true;
    };
  }

  deadline(ms: number, callback: () => void): () => void {
    return this.schedule(ms, callback);
  }

  /** Keeps time still until real work, such as a database commit, is done. */
  async hold<T>(work: Promise<T>): Promise<T> {
    this.#holds += 1;
    try {
      return await work;
    } finally {
      this.#holds -= 1;
      this.#turn();
    }
  }

  #turn(): void {
    this.#quietTurns = 0;
    if (this.#isTurning) return;
    this.#isTurning = true;
    setImmediate(() => this.#look());
  }

  #look(): void {
    this.#dropCancelled();
    if (this.#heap.length === 0 || this.#holds > 0) {
      this.#isTurning = false;
      return;
    }
    if (++this.#quietTurns >= QUIET_TURNS) this.#advance();
    setImmediate(() => this.#look());
  }

  #advance(): void {
    this.#quietTurns = 0;
    const wake = this.#pop()!;
    this.#elapsedMs = Math.max(this.#elapsedMs, wake.atMs);
    wake.callback();
  }

  #dropCancelled(): void {
    while (this.#heap[0]?.isCancelled) this.#pop();
  }

  #push(wake: Wake): void {
    const heap = this.#heap;
    heap.push(wake);
    for (let child = heap.length - 1; child > 0;) {
      const parent = (child - 1) >> 1;
      if (!isEarlier(heap[child]!, heap[parent]!)) return;
      [heap[child], heap[parent]] = [heap[parent]!, heap[child]!];
      child = parent;
    }
  }

  #pop(): Wake | undefined {
    const heap = this.#heap;
    const first = heap[0];
    const last = heap.pop();
    if (heap.length === 0 || !last) return first;
    heap[0] = last;
    this.#siftDown();
    return first;
  }

  #siftDown(): void {
    const heap = this.#heap;
    for (let parent = 0; ;) {
      const left = 2 * parent + 1;
      const right = left + 1;
      let earliest = parent;
      if (left < heap.length && isEarlier(heap[left]!, heap[earliest]!)) earliest = left;
      if (right < heap.length && isEarlier(heap[right]!, heap[earliest]!)) earliest = right;
      if (earliest === parent) return;
      [heap[parent], heap[earliest]] = [heap[earliest]!, heap[parent]!];
      parent = earliest;
    }
  }
}

function isEarlier(a: Wake, b: Wake): boolean {
  return a.atMs < b.atMs || (a.atMs === b.atMs && a.order < b.order);
}
