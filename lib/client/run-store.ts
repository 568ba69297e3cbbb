import { createStore, type StoreApi } from "zustand/vanilla";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { isJournalGapError } from "@/lib/journal/journal-gap-error";
import type { RunState } from "@/lib/journal/run-state";
import type { RunEvent } from "@/lib/schemas/run-event";

export interface RunView {
  run: RunState;
  /** Folds a batch in one change. Says `gap` when records are missing before the rest of it: ask again from `run.lastSeq`. */
  receive(records: readonly RunEvent[]): "current" | "gap";
  /** Takes a newer state as a whole. An older one changes nothing. */
  replace(run: RunState): void;
}

export type RunStore = StoreApi<RunView>;

/** One run as this page knows it: the state from the server, and every record since folded by the one reducer. */
export function createRunStore(initial: RunState): RunStore {
  return createStore<RunView>()((set, get) => ({
    run: initial,
    receive(records) {
      const { run, isWhole } = foldBatch(get().run, records);
      if (run !== get().run) set({ run });
      return isWhole ? "current" : "gap";
    },
    replace(run) {
      if (run.lastSeq > get().run.lastSeq) set({ run });
    },
  }));
}

function foldBatch(start: RunState, records: readonly RunEvent[]): { run: RunState; isWhole: boolean } {
  let run = start;
  try {
    for (const record of records) run = applyRunEvent(run, record);
    return { run, isWhole: true };
  } catch (error) {
    if (!isJournalGapError(error)) throw error;
    return { run, isWhole: false };
  }
}
