import { describe, expect, it } from "vitest";
import { RunRecorder } from "@/lib/engine/run-recorder";
import { ScaledClock } from "@/lib/engine/scaled-clock";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { NewRunEvent, RunEvent } from "@/lib/schemas/run-event";
import { smallSetup } from "../support/journal-builder";

const start: NewRunEvent = { type: "run.started", data: smallSetup };
const note: NewRunEvent = { type: "output.off-proven", data: { terminalVolts: 0 } };

function recorderWith(append: (records: RunEvent[]) => Promise<void>, state: RunState = emptyRun) {
  const told: RunEvent[] = [];
  const recorder = new RunRecorder({
    runId: "run",
    state,
    clock: new ScaledClock(),
    append: (_runId, records) => append(records),
    onCommitted: (records) => told.push(...records),
  });
  return { recorder, told };
}

describe("the recorder of a run", () => {
  it("numbers records from 1 without a gap, across batches", async () => {
    const stored: RunEvent[] = [];
    const { recorder } = recorderWith(async (records) => void stored.push(...records));
    await recorder.record(start);
    for (let count = 0; count < 20; count += 1) recorder.note(note);
    await recorder.commit();
    await recorder.record(note);
    expect(stored.map((record) => record.seq)).toEqual(Array.from({ length: 22 }, (_, index) => index + 1));
  });

  it("tells nobody, and moves no state, before the commit has ended", async () => {
    let release = () => {};
    const { recorder, told } = recorderWith(() => new Promise((resolve) => (release = resolve)));
    const recording = recorder.record(start);
    await Promise.resolve();
    expect(told).toEqual([]);
    expect(recorder.state.status).toBe("empty");
    release();
    await recording;
    expect(told).toHaveLength(1);
    expect(recorder.state.status).toBe("running");
  });

  it("commits a noted record without being asked to", async () => {
    const stored: RunEvent[] = [];
    const { recorder } = recorderWith(async (records) => void stored.push(...records));
    recorder.note(start);
    await expect.poll(() => stored.length).toBe(1);
  });

  it("refuses every further record once a commit has failed, so that no gap arises", async () => {
    let failing = true;
    const stored: RunEvent[] = [];
    const { recorder, told } = recorderWith(async (records) => {
      if (failing) throw new Error("disk full");
      stored.push(...records);
    });
    await expect(recorder.record(start)).rejects.toMatchObject({ name: "EngineError", code: "storage" });
    failing = false;
    expect(() => recorder.note(note)).toThrowError(/could not be stored/u);
    await expect(recorder.commit()).rejects.toMatchObject({ code: "storage" });
    expect(stored).toEqual([]);
    expect(told).toEqual([]);
  });

  it("goes on from the folded journal of an earlier process", async () => {
    const earlier = [start, note].map(
      (event, index) => ({ seq: index + 1, atMs: 1000, elapsedMs: 5000, ...event }) as RunEvent,
    );
    const stored: RunEvent[] = [];
    const { recorder } = recorderWith(
      async (records) => void stored.push(...records),
      earlier.reduce(applyRunEvent, emptyRun),
    );
    await recorder.record(note);
    expect(stored[0]!.seq).toBe(3);
    expect(stored[0]!.elapsedMs).toBeGreaterThanOrEqual(5000);
  });

  it("keeps the order of records noted while a commit is under way", async () => {
    const stored: RunEvent[] = [];
    const { recorder } = recorderWith(async (records) => {
      await new Promise((resolve) => setTimeout(resolve, 1));
      stored.push(...records);
    });
    const waits = Array.from({ length: 10 }, (_, index) => recorder.record(index === 0 ? start : note));
    await Promise.all(waits);
    expect(stored.map((record) => record.seq)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
  });
});
