import type { BenchSnapshot } from "@/lib/schemas/bench";
import type { RunEvent } from "@/lib/schemas/run-event";

type RecordsListener = (runId: string, records: RunEvent[]) => void;
type BenchListener = (snapshot: BenchSnapshot) => void;

/** Tells listeners what has been committed. Nothing is told before it is in the database. */
export class RunFeed {
  readonly #records = new Set<RecordsListener>();
  readonly #benches = new Set<BenchListener>();

  onRecords(listener: RecordsListener): () => void {
    this.#records.add(listener);
    return () => this.#records.delete(listener);
  }

  onBench(listener: BenchListener): () => void {
    this.#benches.add(listener);
    return () => this.#benches.delete(listener);
  }

  tellRecords(runId: string, records: RunEvent[]): void {
    for (const listener of this.#records) listener(runId, records);
  }

  tellBench(snapshot: BenchSnapshot): void {
    for (const listener of this.#benches) listener(snapshot);
  }
}
