import { afterEach, describe, expect, it } from "vitest";
import { foldJournal } from "@/lib/engine/recovery";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { RunEvent, RunEventType } from "@/lib/schemas/run-event";
import { openTestLaboratory, type TestLaboratory } from "../support/test-laboratory";

let laboratory: TestLaboratory;

afterEach(async () => {
  expect(laboratory.simulated.violations).toEqual([]);
  expect(laboratory.troubles).toEqual([]);
  await laboratory.close();
});

async function journalOf(runId: string): Promise<RunEvent[]> {
  return laboratory.repositories.journal.records(runId, { afterSeq: 0, limit: 100_000 });
}

describe("an unattended sweep on the simulated bench", () => {
  it("measures and judges every point, and ends with the output proven off", async () => {
    laboratory = await openTestLaboratory();
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6, 1e9, 10e9], testVolts: [250, 1000] });
    const runId = await laboratory.start(recipe, "TW-0398");
    await laboratory.manager.settled();
    const state = await foldJournal(laboratory.repositories.journal, runId);
    expect(state.status).toBe("finished");
    expect(state.points.map((point) => point.outcome)).toEqual(Array(6).fill("judged"));
    expect(state.output.state).toBe("off");
    expect(laboratory.simulated.circuit.state.isOutputOn).toBe(false);
  });

  it("keeps the order of operations at each point", async () => {
    laboratory = await openTestLaboratory();
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6], testVolts: [250] });
    const runId = await laboratory.start(recipe, "TW-0398");
    await laboratory.manager.settled();
    const order: RunEventType[] = (await journalOf(runId))
      .map(({ type }) => type)
      .filter((type) => type !== "reading.taken");
    expect(order).toEqual([
      "run.started",
      "point.started",
      "output.off-proven",
      "dials.set",
      "voltage.selected",
      "output.switching-on",
      "output.switched-on",
      "point.settled",
      "output.off-proven",
      "point.judged",
      "run.finished",
    ]);
  });

  it("is told by the live state, the replay and the recovery alike, at every record", async () => {
    laboratory = await openTestLaboratory();
    const live = new Map<number, RunState>();
    laboratory.feed.onRecords(() => {
      const state = laboratory.manager.activeState;
      if (state) live.set(state.lastSeq, state);
    });
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6, 5e9], testVolts: [250, 500] });
    const runId = await laboratory.start(recipe, "TW-0409");
    await laboratory.manager.settled();
    let replayed = emptyRun;
    let compared = 0;
    for (const record of await journalOf(runId)) {
      replayed = applyRunEvent(replayed, JSON.parse(JSON.stringify(record)) as RunEvent);
      const then = live.get(record.seq);
      if (!then) continue;
      compared += 1;
      expect(replayed).toEqual(then);
    }
    expect(compared).toBeGreaterThan(8);
    expect(await foldJournal(laboratory.repositories.journal, runId)).toEqual(replayed);
  });

  it("runs the whole 13 by 5 matrix of the workshop with every cell judged", async () => {
    laboratory = await openTestLaboratory();
    const recipe = (await laboratory.repositories.recipes.listReleased()).find(
      ({ document }) => document.name === "Full matrix",
    )!;
    const runId = await laboratory.start(recipe, "TW-0409");
    await laboratory.manager.settled();
    const state = await foldJournal(laboratory.repositories.journal, runId);
    expect(state.points).toHaveLength(65);
    expect(state.points.every((point) => point.judgement !== null)).toBe(true);
    expect(await laboratory.repositories.journal.verifyChain(runId)).toEqual({ intact: true });
  });
});
