import type { RunState } from "@/lib/journal/run-state";
import { ohms, volts } from "@/lib/units/quantities";
import { JournalBuilder, smallSetup } from "../support/journal-builder";

export const ines = { id: "ines", name: "Ines Marlow" };

/** A journal of the small check whose plan also leaves one cell out. */
export function journalWithExclusion(): JournalBuilder {
  const excluded = [
    { nominalOhms: ohms(5e9), testVolts: volts(250), cause: "rating" as const, reason: "300 V is beyond its rating" },
  ];
  const data = { ...smallSetup, plan: { ...smallSetup.plan, excluded } };
  return new JournalBuilder().add({ type: "run.started", data });
}

/** Point 1 inside, point 2 outside, point 3 skipped, point 4 settling. */
export function runInProgress(): RunState {
  const journal = journalWithExclusion().judged(0, "inside").judged(1, "outside").skipped(2, ines);
  return journal.pointStarted(3).offProven().switchingOn().switchedOn().reading(1.9e9).state();
}
