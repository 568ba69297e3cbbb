import { describe, expect, it } from "vitest";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun } from "@/lib/journal/run-state";
import { allowedCommands, nextPoint, stairGroups, timeLeft, verdictCounts } from "@/lib/journal/selectors";
import { stateSentence } from "@/lib/journal/state-sentence";
import { journalOf } from "../support/journal-builder";

const ines = { id: "ines", name: "Ines Marlow" };

describe("a run folded from its journal", () => {
  it("is running from its start on, with every point open", () => {
    const state = journalOf((run) => run.started()).state();
    expect(state.status).toBe("running");
    expect(state.points.every((point) => point.outcome === "open")).toBe(true);
    expect(nextPoint(state)).toBe(0);
  });

  it("ignores a record that it has seen", () => {
    const { records } = journalOf((run) => run.started().pointStarted(0));
    const state = records.reduce(applyRunEvent, emptyRun);
    expect(applyRunEvent(state, records[0]!)).toBe(state);
    expect(applyRunEvent(state, records[1]!)).toBe(state);
  });

  it("refuses a gap and names it", () => {
    const { records } = journalOf((run) => run.started().pointStarted(0).switchedOn());
    const state = applyRunEvent(emptyRun, records[0]!);
    expect(() => applyRunEvent(state, records[2]!)).toThrowError(/from record 1 to 3/u);
  });

  it("never changes the state it was given", () => {
    const { records } = journalOf((run) => run.started().judged(0, "inside").held(ines));
    let state = emptyRun;
    for (const record of records) {
      const before = JSON.stringify(state);
      const after = applyRunEvent(state, record);
      expect(JSON.stringify(state)).toBe(before);
      state = after;
    }
  });

  it("tells the output as on from the moment it is about to be switched on", () => {
    const before = journalOf((run) => run.started().pointStarted(0).offProven()).state();
    const after = journalOf((run) => run.started().pointStarted(0).offProven().switchingOn()).state();
    expect(before.output.state).toBe("off");
    expect(after.output.state).toBe("on");
  });

  it("tells an unproven output as unknown", () => {
    const state = journalOf((run) => run.started().switchedOn().unproven().faulted()).state();
    expect(state.output.state).toBe("unknown");
    expect(state.status).toBe("faulted");
    expect(state.active).toBeNull();
  });

  it("measures a point again that was begun and not judged", () => {
    const state = journalOf((run) =>
      run.started().judged(0, "inside").pointStarted(1).switchedOn().interrupted(),
    ).state();
    expect(nextPoint(state)).toBe(1);
    expect(state.points[1]!.attempts).toBe(1);
    expect(stateSentence(state).lead).toBe("Interrupted");
  });

  it("keeps a trace of bounded size, however long a point lasts", () => {
    const journal = journalOf((run) => {
      run.started().pointStarted(0).switchedOn();
      for (let count = 0; count < 5000; count += 1) run.reading(1e9 + count);
    });
    const { active } = journal.state();
    expect(active!.trace.length).toBeLessThan(1200);
    expect(active!.samples).toBe(5000);
    expect(active!.trace.at(-1)!.ohms).toBeGreaterThan(1e9 + 4900);
  });

  it("offers the commands that mean something", () => {
    expect(allowedCommands(journalOf((run) => run.started()).state())).toEqual(["hold", "skip", "stop"]);
    expect(allowedCommands(journalOf((run) => run.started().held(ines)).state())).toContain("resume");
    expect(allowedCommands(journalOf((run) => run.started().interrupted()).state())).toEqual(["resume", "stop"]);
    expect(allowedCommands(journalOf((run) => run.started().stopped(ines)).state())).toEqual([]);
  });

  it("counts verdicts and draws a step for each point", () => {
    const state = journalOf((run) =>
      run.started().judged(0, "inside").judged(1, "outside").skipped(2, ines).pointStarted(3),
    ).state();
    expect(verdictCounts(state)).toMatchObject({ inside: 1, outside: 1, skipped: 1, open: 1, total: 4 });
    expect(stairGroups(state)).toEqual([
      { testVolts: 250, steps: ["inside", "outside"] },
      { testVolts: 500, steps: ["skipped", "present"] },
    ]);
  });

  it("expects the forecast before the first point, and nothing after the last", () => {
    const fresh = timeLeft(journalOf((run) => run.started()).state())!;
    expect(fresh.seconds).toBeCloseTo(4 * 10, 6);
    const done = journalOf((run) =>
      [0, 1, 2, 3].reduce((journal, point) => journal.judged(point, "inside"), run.started()).finished(),
    ).state();
    expect(timeLeft(done)).toBeNull();
  });
});
