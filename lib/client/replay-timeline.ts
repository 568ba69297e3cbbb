import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { readingAt } from "@/lib/journal/columns";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { JournalColumns, ReadingColumns } from "@/lib/schemas/journal-columns";
import type { RunEvent } from "@/lib/schemas/run-event";

/** Within a long attempt a state is kept every so many records. */
export const CHECKPOINT_EVERY = 50;

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
  const { record, elapsedMsAt, lastSeq } = recordsBySeq(columns);
  const stateAt = stateFinder(attemptStarts(columns), record, lastSeq);
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

/** Access to events and readings as one sequence. Throws RangeError when a number is missing or doubled. */
function recordsBySeq({ events, readings }: JournalColumns) {
  const lastSeq = events.length + readings.seq.length;
  /** For each seq from 1: one more than the index of its event, or the negative of that for its reading; 0 for none. */
  const places = new Int32Array(lastSeq);
  const place = (seq: number, at: number) => {
    if (places[seq - 1] !== 0) throw new RangeError(`record ${seq} of the journal is doubled, or another is missing`);
    places[seq - 1] = at;
  };
  events.forEach(({ seq }, index) => place(seq, index + 1));
  readings.seq.forEach((seq, index) => place(seq, -index - 1));

  const record = (seq: number): RunEvent => {
    const at = places[seq - 1];
    if (at === undefined) throw new RangeError(`the journal has records 1 to ${lastSeq}, not ${seq}`);
    return at > 0 ? events[at - 1]! : readingAt(readings, -at - 1);
  };
  const elapsedMsAt = (seq: number): number => {
    const at = places[seq - 1];
    if (at === undefined) return 0;
    return at > 0 ? events[at - 1]!.elapsedMs : readings.elapsedMs[-at - 1]!;
  };
  return { record, elapsedMsAt, lastSeq };
}

/**
 * The state after each start of an attempt, in order. An attempt begins with nothing measured, so the readings before it
 * matter only by the voltage that the last of them left on the terminals: all others need no folding.
 */
function attemptStarts({ events, readings }: JournalColumns): RunState[] {
  const starts: RunState[] = [];
  let state = emptyRun;
  let firstReading = 0;
  for (const event of events) {
    const endReading = firstIndexFrom(readings, firstReading, event.seq);
    const lastVolts = lastVoltsBetween(readings, firstReading, endReading);
    if (lastVolts !== null) {
      const reading = readingAt(readings, lastVolts);
      state = applyRunEvent({ ...state, active: null, lastSeq: reading.seq - 1 }, reading);
    }
    state = applyRunEvent({ ...state, lastSeq: event.seq - 1 }, event);
    if (event.type === "point.started") starts.push(state);
    firstReading = endReading;
  }
  return starts;
}

function firstIndexFrom({ seq }: ReadingColumns, from: number, beforeSeq: number): number {
  let index = from;
  while (index < seq.length && seq[index]! < beforeSeq) index += 1;
  return index;
}

function lastVoltsBetween({ volts }: ReadingColumns, from: number, end: number): number | null {
  for (let index = end - 1; index >= from; index -= 1) if (volts[index] !== null) return index;
  return null;
}

/** Folds from the nearest state known: the start of the attempt, one kept within it, or the one asked for last. */
function stateFinder(starts: readonly RunState[], record: (seq: number) => RunEvent, lastSeq: number) {
  const kept = new Map<number, RunState>();
  let latest: RunState = emptyRun;

  const nearest = (target: number): RunState => {
    let best = starts.findLast((start) => start.lastSeq <= target) ?? emptyRun;
    if (latest.lastSeq <= target && latest.lastSeq > best.lastSeq) best = latest;
    for (let seq = target - (target % CHECKPOINT_EVERY); seq > best.lastSeq; seq -= CHECKPOINT_EVERY) {
      const state = kept.get(seq);
      if (state) return state;
    }
    return best;
  };

  return (seq: number): RunState => {
    const target = Math.min(Math.max(0, Math.floor(seq)), lastSeq);
    let state = nearest(target);
    while (state.lastSeq < target) {
      state = applyRunEvent(state, record(state.lastSeq + 1));
      if (state.lastSeq % CHECKPOINT_EVERY === 0) kept.set(state.lastSeq, state);
    }
    latest = state;
    return state;
  };
}
