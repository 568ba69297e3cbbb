import { createStore, type StoreApi } from "zustand/vanilla";
import { advance } from "./replay-clock";
import { nextOutsideSeq, nextPointSeq, previousPointSeq, scrubSeq, type PointSpan } from "./replay-stops";
import type { ReplayTimeline } from "./replay-timeline";

export const REPLAY_SPEEDS = [1, 10, 60, 500] as const;
export type ReplaySpeed = (typeof REPLAY_SPEEDS)[number];

export interface ReplayView {
  /** The moment shown. */
  seq: number;
  /** Run time of the moment, between records too. */
  elapsedMs: number;
  isPlaying: boolean;
  speed: ReplaySpeed;
  /** The viewer's time has passed. */
  tick(passedMs: number): void;
  togglePlay(): void;
  setSpeed(speed: ReplaySpeed): void;
  seek(seq: number): void;
  /** To a place on the stair line, 0 to 1 through a point. */
  scrub(point: number, fraction: number): void;
  step(records: number): void;
  pointBefore(): void;
  nextPoint(): void;
  nextOutside(): void;
}

export type ReplayStore = StoreApi<ReplayView>;

/** Where a replay stands and how it moves. `atSeq` outside the journal is taken to its nearest end. */
export function createReplayStore(timeline: ReplayTimeline, spans: readonly PointSpan[], atSeq: number): ReplayStore {
  const moment = (seq: number) => {
    const kept = Math.min(Math.max(Math.min(1, timeline.lastSeq), Math.round(seq)), timeline.lastSeq);
    return { seq: kept, elapsedMs: timeline.elapsedMsAt(kept) };
  };
  return createStore<ReplayView>()((set, get) => {
    const seek = (seq: number) => set(moment(seq));
    const seekIfAny = (seq: number | null) => void (seq === null || set({ ...moment(seq), isPlaying: false }));
    return {
      ...moment(atSeq),
      isPlaying: false,
      speed: 10,
      tick(passedMs) {
        const { isPlaying, elapsedMs: fromMs, speed } = get();
        if (!isPlaying) return;
        const elapsedMs = advance(timeline, fromMs, passedMs, speed);
        const seq = timeline.seqAt(elapsedMs);
        set({ elapsedMs, seq, isPlaying: seq < timeline.lastSeq });
      },
      togglePlay() {
        const { isPlaying, seq } = get();
        if (!isPlaying && seq >= timeline.lastSeq) set({ ...moment(0), isPlaying: true });
        else set({ isPlaying: !isPlaying });
      },
      setSpeed: (speed) => set({ speed }),
      seek,
      scrub: (point, fraction) => seek(scrubSeq(spans, point, fraction, timeline.lastSeq)),
      step: (records) => seekIfAny(get().seq + records),
      pointBefore: () => seekIfAny(previousPointSeq(spans, get().seq) ?? 1),
      nextPoint: () => seekIfAny(nextPointSeq(spans, get().seq) ?? timeline.lastSeq),
      nextOutside: () => seekIfAny(nextOutsideSeq(spans, get().seq)),
    };
  });
}
