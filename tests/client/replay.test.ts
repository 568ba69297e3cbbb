import { describe, expect, it } from "vitest";
import { advance } from "@/lib/client/replay-clock";
import {
  nextOutsideSeq,
  nextPointSeq,
  pointSpans,
  previousPointSeq,
  scrubPlace,
  scrubSeq,
} from "@/lib/client/replay-stops";
import { CHECKPOINT_EVERY, createTimeline } from "@/lib/client/replay-timeline";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun } from "@/lib/journal/run-state";
import type { RunEvent } from "@/lib/schemas/run-event";
import { sampleJournal, toColumns } from "./sample-journal";

const records = sampleJournal();

/** The sample with `count` readings more in the attempt on its first point. */
function longJournal(count: number): RunEvent[] {
  const at = records.findIndex((record) => record.type === "reading.taken");
  const model = records[at]!;
  const extra = Array.from({ length: count }, () => model);
  return [...records.slice(0, at), ...extra, ...records.slice(at)].map((record, index) => ({
    ...record,
    seq: index + 1,
    elapsedMs: Math.max(record.elapsedMs, index < at + count ? (index - at) * 10 : 0) + count * 10,
  }));
}

describe("the timeline", () => {
  it("gives on every prefix the state that a straight fold gives", () => {
    const timeline = createTimeline(toColumns(records));
    let straight = emptyRun;
    for (const record of records) {
      straight = applyRunEvent(straight, record);
      expect(timeline.stateAt(record.seq)).toEqual(straight);
    }
    expect(timeline.stateAt(0)).toBe(emptyRun);
  });

  it("agrees with a straight fold across checkpoints, jumped to in any order", () => {
    const journal = longJournal(30 * CHECKPOINT_EVERY);
    const straight = [emptyRun];
    for (const record of journal) straight.push(applyRunEvent(straight.at(-1)!, record));
    const timeline = createTimeline(toColumns(journal));
    const jumps = [journal.length, 3, 501, 500, 499, 1200, 1000, 1001, 7, journal.length - 1, 0, 760, 761];
    for (const seq of jumps) expect(timeline.stateAt(seq)).toEqual(straight[seq]);
  });

  it("opens the journal of a run that is not over at any length", () => {
    let straight = emptyRun;
    for (const record of records) {
      straight = applyRunEvent(straight, record);
      expect(createTimeline(toColumns(records.slice(0, record.seq))).end).toEqual(straight);
    }
  });

  it("refuses a journal with a number missing or doubled", () => {
    const columns = toColumns(records);
    expect(() => createTimeline({ ...columns, events: columns.events.slice(1) })).toThrow(RangeError);
    expect(() => createTimeline({ ...columns, events: [columns.events[0]!, ...columns.events] })).toThrow(RangeError);
  });

  it("finds the latest moment at or before a run time", () => {
    const timeline = createTimeline(toColumns(records));
    for (const record of records) {
      const seq = timeline.seqAt(record.elapsedMs);
      expect(timeline.elapsedMsAt(seq)).toBe(record.elapsedMs);
      expect(seq).toBeGreaterThanOrEqual(record.seq);
    }
    expect(timeline.seqAt(Number.MAX_SAFE_INTEGER)).toBe(records.length);
  });
});

describe("the stops", () => {
  const spans = pointSpans(toColumns(records).events, records.length);
  const judgedSeqs = records.filter((record) => record.type === "point.judged").map((record) => record.seq);

  it("covers every moment from the first point on, repeated attempts in one span", () => {
    expect(spans.map((span) => span.point)).toEqual([0, 1, 2, 3]);
    for (const [index, span] of spans.entries()) {
      expect(span.toSeq).toBe((spans[index + 1]?.fromSeq ?? records.length + 1) - 1);
    }
  });

  it("steps to each complete trace and back", () => {
    const forward: number[] = [];
    for (let seq = nextPointSeq(spans, 0); seq !== null; seq = nextPointSeq(spans, seq)) forward.push(seq);
    expect(forward.slice(0, 3)).toEqual(judgedSeqs.map((seq) => seq - 1));
    expect(previousPointSeq(spans, forward[2]!)).toBe(forward[1]);
    expect(previousPointSeq(spans, forward[0]!)).toBeNull();
  });

  it("stops at the point outside its limit, with its readings in view", () => {
    const seq = nextOutsideSeq(spans, 0)!;
    expect(seq).toBe(judgedSeqs[2]! - 1);
    expect(createTimeline(toColumns(records)).stateAt(seq).active?.averaged).toBe(2);
    expect(nextOutsideSeq(spans, seq)).toBeNull();
  });

  it("comes back to the same moment from its place on the stair line", () => {
    for (let seq = spans[0]!.fromSeq; seq <= records.length; seq += 1) {
      const { point, fraction } = scrubPlace(spans, seq)!;
      expect(scrubSeq(spans, point, fraction, records.length)).toBe(seq);
    }
  });
});

describe("the replay's clock", () => {
  const timeline = createTimeline(toColumns(records));

  it("passes run time at the chosen speed", () => {
    expect(advance(timeline, 1000, 16, 10)).toBe(1160);
  });

  it("shows for a moment that the run stood still, then jumps over the hour", () => {
    const resumed = records.find((record) => record.type === "run.resumed")!;
    const interrupted = records.find((record) => record.type === "run.interrupted")!;
    expect(advance(timeline, interrupted.elapsedMs, 16, 1)).toBe(interrupted.elapsedMs + 16);
    expect(advance(timeline, interrupted.elapsedMs, 1600, 1)).toBe(resumed.elapsedMs);
  });

  it("ends at the last record", () => {
    expect(advance(timeline, timeline.lastElapsedMs - 5, 1000, 500)).toBe(timeline.lastElapsedMs);
  });
});
