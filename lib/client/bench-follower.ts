import { createStore, type StoreApi } from "zustand/vanilla";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import { followRun, type RunFollowing } from "./run-follower";
import { createRunStore } from "./run-store";

export interface BenchesView {
  benches: BenchSnapshot[];
  /** State of each active run, by run id. */
  runs: Readonly<Record<string, RunState>>;
}

export type BenchesStore = StoreApi<BenchesView>;

export function createBenchesStore(initial: BenchesView): BenchesStore {
  return createStore<BenchesView>()(() => initial);
}

export type BenchesFollowing = Omit<RunFollowing, "runId" | "store"> & { store: BenchesStore };

/** Keeps all benches and their active runs up with the server. Returns a function that ends it. */
export function followBenches(following: BenchesFollowing): () => void {
  const { store, socket, onWake } = following;
  const endings = new Map<string, () => void>();
  let isEnded = false;

  const followActive = () => {
    const active = new Set(store.getState().benches.flatMap((bench) => bench.activeRunId ?? []));
    for (const [runId, end] of endings) {
      if (active.has(runId)) continue;
      end();
      endings.delete(runId);
    }
    for (const runId of active) if (!endings.has(runId)) endings.set(runId, followActiveRun(following, runId));
  };
  const takeAll = (benches: BenchSnapshot[]) => {
    if (isEnded) return;
    store.setState({ benches });
    followActive();
  };
  const takeOne = (snapshot: BenchSnapshot) =>
    takeAll(store.getState().benches.map((bench) => (bench.id === snapshot.id ? snapshot : bench)));
  const ask = () => void (socket.connected && socket.emit("benches:follow", takeAll));

  socket.on("connect", ask);
  socket.on("bench:changed", takeOne);
  const stopWaking = onWake(ask);
  followActive();
  ask();
  return () => {
    isEnded = true;
    socket.off("connect", ask);
    socket.off("bench:changed", takeOne);
    stopWaking();
    for (const end of endings.values()) end();
  };
}

/** Follows one run and copies each state of it into the benches' store. */
function followActiveRun(following: BenchesFollowing, runId: string): () => void {
  const { store, fetchState } = following;
  let end: (() => void) | null = null;
  let isEnded = false;

  const begin = (initial: RunState) => {
    if (isEnded) return;
    const runStore = createRunStore(initial);
    const publish = (run: RunState) => store.setState(({ runs }) => ({ runs: { ...runs, [runId]: run } }));
    publish(initial);
    const unsubscribe = runStore.subscribe(({ run }) => publish(run));
    const unfollow = followRun({ ...following, runId, store: runStore });
    end = () => (unsubscribe(), unfollow());
  };

  const known = store.getState().runs[runId];
  if (known) begin(known);
  else void fetchState(runId).then(begin, () => begin(emptyRun));
  return () => {
    isEnded = true;
    end?.();
  };
}
