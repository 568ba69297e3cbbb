import { createStore, type StoreApi } from "zustand/vanilla";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import { followRun, type FollowSocket, type RunFollowing } from "./run-follower";
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

interface SnapshotsFollowing {
  socket: FollowSocket;
  onWake(listener: () => void): () => void;
  onAll(benches: BenchSnapshot[]): void;
  onOne(bench: BenchSnapshot): void;
}

/** Hears of every bench: all at once on each connect and wake, then each that changes. Returns a function that ends it. */
export function followSnapshots({ socket, onWake, onAll, onOne }: SnapshotsFollowing): () => void {
  let isEnded = false;
  const takeAll = (benches: BenchSnapshot[]) => {
    if (!isEnded) onAll(benches);
  };
  const ask = () => {
    if (socket.connected) socket.emit("benches:follow", takeAll);
  };
  socket.on("connect", ask);
  socket.on("bench:changed", onOne);
  const stopWaking = onWake(ask);
  ask();
  return () => {
    isEnded = true;
    socket.off("connect", ask);
    socket.off("bench:changed", onOne);
    stopWaking();
  };
}

export type BenchesFollowing = Omit<RunFollowing, "runId" | "store"> & { store: BenchesStore };

/** Keeps all benches and their active runs up with the server. Returns a function that ends it. */
export function followBenches(following: BenchesFollowing): () => void {
  const { store, socket, onWake } = following;
  const endings = new Map<string, () => void>();

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
    store.setState({ benches });
    followActive();
  };
  const takeOne = (snapshot: BenchSnapshot) =>
    takeAll(store.getState().benches.map((bench) => (bench.id === snapshot.id ? snapshot : bench)));

  followActive();
  const stopSnapshots = followSnapshots({ socket, onWake, onAll: takeAll, onOne: takeOne });
  return () => {
    stopSnapshots();
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
    end = () => {
      unsubscribe();
      unfollow();
    };
  };

  const known = store.getState().runs[runId];
  if (known) begin(known);
  else
    void fetchState(runId).then(begin, () => {
      // Following from the very first record tells the same, only later.
      begin(emptyRun);
    });
  return () => {
    isEnded = true;
    end?.();
  };
}
