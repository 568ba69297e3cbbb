import { afterEach, describe, expect, it } from "vitest";
import { answering, garbled, silent } from "@/drivers/simulated/faults";
import { foldJournal } from "@/lib/engine/recovery";
import type { RunState } from "@/lib/journal/run-state";
import type { RunCommand } from "@/lib/schemas/run";
import { actor, openTestLaboratory, type TestLaboratory } from "../support/test-laboratory";

let laboratory: TestLaboratory;

afterEach(async () => {
  expect(laboratory.simulated.violations).toEqual([]);
  await laboratory.close();
});

/** A bench with a run that waits long at each of three points. */
async function startLongRun(): Promise<string> {
  laboratory = await openTestLaboratory();
  const settling = { kind: "fixed", waitSeconds: 60 };
  const recipe = await laboratory.addRecipe({ nominalOhms: [1e6, 1e9, 5e9], testVolts: [500], settling });
  return laboratory.start(recipe, "TW-0398");
}

function command(runId: string, kind: RunCommand["kind"]): Promise<void> {
  return laboratory.roster.command(runId, { id: crypto.randomUUID(), kind, reason: null }, actor);
}

function stateOf(runId: string): Promise<RunState> {
  return foldJournal(laboratory.repositories.journal, runId);
}

async function seconds(count: number): Promise<void> {
  await laboratory.clock.sleep(count * 1000);
}

describe("a person's commands", () => {
  it("stop within a second of bench time, with the output proven off", async () => {
    const runId = await startLongRun();
    await seconds(20);
    expect(laboratory.simulated.circuit.state.isOutputOn).toBe(true);
    const before = laboratory.clock.monotonicMs();
    const stopping = command(runId, "stop");
    await laboratory.clock.sleep(20);
    expect(laboratory.simulated.circuit.state.isOutputOn).toBe(false);
    await stopping;
    expect(laboratory.clock.monotonicMs() - before).toBeLessThanOrEqual(1000);
    const state = await stateOf(runId);
    expect(state.status).toBe("stopped");
    expect(state.output.state).toBe("off");
    expect(laboratory.manager.activeRunId).toBeNull();
  });

  it("hold at once, and resume measures the point again as its second attempt", async () => {
    const runId = await startLongRun();
    await seconds(20);
    await command(runId, "hold");
    const held = await stateOf(runId);
    expect(held.status).toBe("held");
    expect(held.output.state).toBe("off");
    await command(runId, "resume");
    await laboratory.manager.settled();
    const done = await stateOf(runId);
    expect(done.status).toBe("finished");
    expect(done.points.map((point) => point.attempts)).toEqual([2, 1, 1]);
  });

  it("skip the present point and go on with the next", async () => {
    const runId = await startLongRun();
    await seconds(20);
    await command(runId, "skip");
    await laboratory.manager.settled();
    const state = await stateOf(runId);
    expect(state.points.map((point) => point.outcome)).toEqual(["skipped", "judged", "judged"]);
  });

  it("stop a held run, and refuse what means nothing any more", async () => {
    const runId = await startLongRun();
    await seconds(20);
    await command(runId, "hold");
    await expect(command(runId, "hold")).rejects.toMatchObject({ code: "not-allowed-now" });
    await command(runId, "stop");
    expect((await stateOf(runId)).status).toBe("stopped");
    await expect(command(runId, "resume")).rejects.toMatchObject({ code: "not-active" });
  });

  it("act once, however often they are sent", async () => {
    const runId = await startLongRun();
    await seconds(20);
    const hold: RunCommand = { id: crypto.randomUUID(), kind: "hold", reason: null };
    await Promise.all([1, 2, 3].map(() => laboratory.roster.command(runId, hold, actor)));
    const journal = await laboratory.repositories.journal.events(runId);
    expect(journal.filter(({ type }) => type === "run.held")).toHaveLength(1);
  });

  it("start one run a bench, of many that are asked for at once", async () => {
    laboratory = await openTestLaboratory();
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6], testVolts: [500] });
    const starts = await Promise.allSettled(Array.from({ length: 6 }, () => laboratory.start(recipe, "TW-0398")));
    expect(starts.filter(({ status }) => status === "fulfilled").length).toBe(1);
    await laboratory.manager.settled();
  });
});

describe("trouble on the bench", () => {
  it.each([
    ["silence", () => silent(2)],
    ["broken characters", () => garbled(2)],
  ])("is cured by asking again after %s, and told in the journal", async (_, fault) => {
    const runId = await startLongRun();
    await seconds(20);
    laboratory.simulated.inject("tester", fault());
    await laboratory.manager.settled();
    const state = await stateOf(runId);
    expect(state.status).toBe("finished");
    const journal = await laboratory.repositories.journal.events(runId);
    expect(journal.some(({ type }) => type === "device.recovered")).toBe(true);
  });

  it("holds the run as faulted when a port is lost, within two seconds, and resumes when it is back", async () => {
    const runId = await startLongRun();
    await seconds(20);
    const before = laboratory.clock.monotonicMs();
    laboratory.simulated.unplug("tester");
    await laboratory.manager.settled();
    expect(laboratory.clock.monotonicMs() - before).toBeLessThan(2000);
    const faulted = await stateOf(runId);
    expect(faulted.status).toBe("faulted");
    expect(faulted.trouble).toMatchObject({ code: "port-lost" });
    expect(faulted.output.state).toBe("unknown");
    await expect(command(runId, "resume")).rejects.toThrowError();
    laboratory.simulated.plugIn("tester");
    await command(runId, "resume");
    await laboratory.manager.settled();
    expect((await stateOf(runId)).status).toBe("finished");
  });

  it("refuses to resume with another instrument on the port", async () => {
    const runId = await startLongRun();
    await seconds(20);
    await command(runId, "hold");
    const [other] = await laboratory.repositories.units.list("TW-0421");
    laboratory.simulated.connectUnit(other!);
    await expect(command(runId, "resume")).rejects.toThrowError(/P10-4533.*P10-4471/u);
    expect((await stateOf(runId)).status).toBe("held");
  });

  it("holds the run when the dials read back wrong twice, before anything is switched on", async () => {
    const runId = await startLongRun();
    await seconds(20);
    laboratory.simulated.inject("decade-box", answering(/POS\?/u, "1,1,1,1,1,1,1,1", 10));
    await laboratory.manager.settled();
    const state = await stateOf(runId);
    expect(state.status).toBe("faulted");
    expect(state.trouble).toMatchObject({ code: "wrong-read-back" });
    expect(state.output.state).toBe("off");
  });

  it("goes on when the dials read back wrong once", async () => {
    const runId = await startLongRun();
    await seconds(20);
    laboratory.simulated.inject("decade-box", answering(/POS\?/u, "1,1,1,1,1,1,1,1", 1));
    await laboratory.manager.settled();
    expect((await stateOf(runId)).status).toBe("finished");
  });

  it("tells the output as unknown when the tester can't be switched off", async () => {
    const runId = await startLongRun();
    await seconds(20);
    laboratory.simulated.circuit.wiring.isStuckOn = true;
    await command(runId, "hold");
    const state = await stateOf(runId);
    expect(state.status).toBe("faulted");
    expect(state.output.state).toBe("unknown");
    expect(state.trouble!.cure).toMatch(/live/u);
    laboratory.simulated.circuit.wiring.isStuckOn = false;
  });

  it("does not believe the tester when the terminals keep their charge", async () => {
    const runId = await startLongRun();
    await seconds(20);
    laboratory.simulated.circuit.wiring.keepsCharge = true;
    await command(runId, "hold");
    const state = await stateOf(runId);
    expect(state.trouble).toMatchObject({ code: "not-discharged" });
    expect(state.output.state).toBe("unknown");
    laboratory.simulated.circuit.wiring.keepsCharge = false;
  });

  it("stops a run whose bench can't be proven safe, and says so", async () => {
    const runId = await startLongRun();
    await seconds(20);
    laboratory.simulated.circuit.wiring.isStuckOn = true;
    await command(runId, "stop");
    const state = await stateOf(runId);
    expect(state.status).toBe("stopped");
    expect(state.output.state).toBe("unknown");
    laboratory.simulated.circuit.wiring.isStuckOn = false;
  });
});

describe("a preflight", () => {
  it("leaves points beyond the box's rating out, with their reason", async () => {
    laboratory = await openTestLaboratory({ benchName: "Cold room bench" });
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6, 10e6], testVolts: [50, 500] });
    const runId = await laboratory.start(recipe, "TW-0398");
    await laboratory.manager.settled();
    const { setup } = await stateOf(runId);
    expect(setup!.plan.excluded.map(({ testVolts, cause }) => [testVolts, cause])).toEqual([
      [500, "rating"],
      [500, "rating"],
    ]);
    expect(setup!.plan.excluded[0]!.reason).toMatch(/250/u);
  });

  it("blocks a start when a device does not answer, and switches nothing on", async () => {
    laboratory = await openTestLaboratory();
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6], testVolts: [500] });
    laboratory.simulated.unplug("meter");
    await expect(laboratory.start(recipe, "TW-0398")).rejects.toMatchObject({ code: "not-ready" });
    expect(laboratory.simulated.settings.some(({ line }) => line === "OUTP ON")).toBe(false);
    laboratory.simulated.plugIn("meter");
  });

  it("blocks a start with a caution that nobody confirmed", async () => {
    laboratory = await openTestLaboratory();
    const recipe = await laboratory.addRecipe({ nominalOhms: [1e6], testVolts: [500] });
    const [unit] = await laboratory.repositories.units.list("TW-0398");
    const order = {
      requestId: crypto.randomUUID(),
      benchId: "north",
      unitId: unit!.id,
      recipeVersionId: recipe.id,
      condition: "as-found" as const,
      cautions: [],
      clockSpeed: 1,
    };
    await expect(laboratory.roster.start(order, actor)).rejects.toMatchObject({ code: "not-ready" });
  });
});
