/** The bench's time. Engine, drivers and simulation know no other, so the same run takes an hour on the bench and seconds in a test. */
export interface Clock {
  /** How many bench seconds pass in one real second; hardware always runs at 1. */
  readonly speed: number;
  /** UTC milliseconds since the Unix epoch, for people. May jump when the machine's clock is set. */
  nowMs(): number;
  /** Monotonic milliseconds, for arithmetic. */
  monotonicMs(): number;
  /** Resolves after `ms` of bench time. Rejects with the signal's reason when aborted. */
  sleep(ms: number, signal?: AbortSignal): Promise<void>;
  /** Calls back after `ms` of bench time; returns a function that cancels. */
  schedule(ms: number, callback: () => void): () => void;
  /**
   * Calls back when an exchange of `ms` has lasted too long. Never shorter than `ms` of real time where work is real,
   * so that a fast clock does not turn ordinary latency into time-outs.
   */
  deadline(ms: number, callback: () => void): () => void;
  /** Lets real work, such as a database commit, end before bench time goes on. Returns that work. */
  hold<T>(work: Promise<T>): Promise<T>;
}
