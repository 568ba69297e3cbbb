import type { Actor } from "@/lib/schemas/person";

/** Why the attempt under way is to end at once. */
export interface Interruption {
  kind: "hold" | "skip" | "stop" | "shutdown";
  by: Actor;
  reason: string | null;
}

/** The abort reason of an attempt that a person ended. */
export class AttemptInterrupted extends Error {
  override readonly name = "AttemptInterrupted";
  constructor(readonly interruption: Interruption) {
    super(`the attempt was ended by ${interruption.kind}`);
  }
}

export function isAttemptInterrupted(error: unknown): error is AttemptInterrupted {
  return error instanceof Error && error.name === "AttemptInterrupted";
}

/** Carries a person's wish to the sequencer: the signal of the present attempt, aborted with the reason. */
export class RunControl {
  #controller = new AbortController();
  #interruption: Interruption | null = null;

  get signal(): AbortSignal {
    return this.#controller.signal;
  }

  /** The wish that has not been answered yet. A stop outranks any other. */
  get interruption(): Interruption | null {
    return this.#interruption;
  }

  interrupt(interruption: Interruption): void {
    if (this.#interruption?.kind === "stop") return;
    this.#interruption = interruption;
    this.#controller.abort(new AttemptInterrupted(interruption));
  }

  /** Takes the wish and makes ready for the next attempt. */
  answer(): void {
    this.#interruption = null;
    this.#controller = new AbortController();
  }
}
