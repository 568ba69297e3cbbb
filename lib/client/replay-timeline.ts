import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { readingAt } from "@/lib/journal/columns";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { JournalColumns } from "@/lib/schemas/journal-columns";
import type { RunEvent } from "@/lib/schemas/run-event";

/** Records between two kept states: a jump folds fewer than this. */
export const CHECKPOINT_EVERY = 500;

/** A whole journal in which any moment can be had at once. Moments are numbered by `seq`, 0 before the first record. */
export interface ReplayTimeline {
  lastSeq: number;
  lastElapsedMs: number;
  /** State after the last record. */
  end: RunState;
  /** State after the records 1 to `seq`. */
  stateAt(seq: number): RunState;
  record(seq: number): RunEvent;
  elapsedMsAt(seq: number): number;
  /** The latest moment at or before this run time. */
  seqAt(elapsedMs: number): number;
}

/** Readings stay in their columns until their turn comes, so that a million of them are not a million objects. */
export function createTimeline(columns: JournalColumns): ReplayTimeline {
  const { events, readings } = columns;
  const lastSeq = events.length + readings.seq.length;
  const places = placesBySeq(columns, lastSeq);
  const checkpoints: RunState[] = [emptyRun];
  let latest: RunState = emptyRun;

  const record = (seq: number): RunEvent => {
    const place = places[seq - 1];
    if (place === undefined) throw new RangeError(`the journal has records 1 to ${lastSeq}, not ${seq}`);
    return place >= 0 ? events[place]! : readingAt(readings, -place - 1);
  };
  const elapsedMsAt = (seq: number): number => {
    const place = seq === 0 ? undefined : places[seq - 1];
    if (place === undefined) return 0;
    return place >= 0 ? events[place]!.elapsedMs : readings.elapsedMs[-place - 1]!;
  };
  const stateAt = (seq: number): RunState => {
    const target = Math.min(Math.max(0, Math.floor(seq)), lastSeq);
    const kept = checkpoints[Math.min(Math.floor(target / CHECKPOINT_EVERY), checkpoints.length - 1)]!;
    let state = latest.lastSeq <= target && latest.lastSeq > kept.lastSeq ? latest : kept;
    while (state.lastSeq < target) {
      state = applyRunEvent(state, record(state.lastSeq + 1));
      if (state.lastSeq === checkpoints.length * CHECKPOINT_EVERY) checkpoints.push(state);
    }
    latest = state;
    return state;
  };
  const seqAt = (elapsedMs: number): number => {
    let low = 0;
    let high = lastSeq;
    while (low < high) {
      const middle = Math.ceil((low + high) / 2);
      if (elapsedMsAt(middle) <= elapsedMs) low = middle;
      else high = middle - 1;
    }
    return low;
  };
  return { lastSeq, lastElapsedMs: elapsedMsAt(lastSeq), end: stateAt(lastSeq), stateAt, record, elapsedMsAt, seqAt };
}

/** For each seq from 1: the index of its event, or −1 − the index of its reading. Throws RangeError when a number is missing. */
function placesBySeq({ events, readings }: JournalColumns, lastSeq: number): Int32Array {
  const places = new Int32Array(lastSeq);
  const filled = new Uint8Array(lastSeq);
  const place = (seq: number, at: number) => {
    if (seq < 1 || seq > lastSeq || filled[seq - 1]) throw new RangeError(`record ${seq} is out of order`);
    places[seq - 1] = at;
    filled[seq - 1] = 1;
  };
  events.forEach((event, index) => place(event.seq, index));
  readings.seq.forEach((seq, index) => place(seq, -1 - index));
  return places;
}
