import type { Clock } from "@/lib/engine/clock";

export interface TracedLine {
  atMs: number;
  direction: "sent" | "received";
  line: string;
}

const KEPT_LINES = 500;

/** The newest lines of a port, for people who look for a fault. */
export class LineTrace {
  readonly #lines: TracedLine[] = [];

  constructor(private readonly clock: Clock) {}

  get lines(): readonly TracedLine[] {
    return this.#lines;
  }

  sent(line: string): void {
    this.#add("sent", line);
  }

  received(line: string): void {
    this.#add("received", line);
  }

  #add(direction: TracedLine["direction"], line: string): void {
    this.#lines.push({ atMs: this.clock.nowMs(), direction, line });
    if (this.#lines.length > KEPT_LINES) this.#lines.splice(0, KEPT_LINES / 10);
  }
}
