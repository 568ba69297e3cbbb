import type { Repositories } from "@/lib/data/repositories";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { pointName } from "@/lib/journal/describe-event";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import { isOver, nextPoint } from "@/lib/journal/selectors";
import { summariseRun } from "@/lib/journal/run-summary";
import type { Trouble } from "@/lib/schemas/run-event";
import type { BenchManager } from "./bench-manager";
import type { RunRecorder } from "./run-recorder";

/** Records folded at a time, so that a long journal does not fill the memory. */
const PAGE = 5000;

/** Folds a run's whole journal. */
export async function foldJournal(journal: Repositories["journal"], runId: string): Promise<RunState> {
  let state = emptyRun;
  for (;;) {
    const records = await journal.records(runId, { afterSeq: state.lastSeq, limit: PAGE });
    if (records.length === 0) return state;
    state = records.reduce(applyRunEvent, state);
  }
}

/**
 * After a crash or a power cut: takes over the run that was on the bench, with the bench made safe first, and says
 * in the journal that it was interrupted. Nothing is switched on; a person resumes.
 */
export async function recoverBench(
  manager: BenchManager,
  repositories: Pick<Repositories, "journal" | "runs">,
): Promise<{ runId: string } | null> {
  const trouble = await manager.makeSafe();
  const unfinished = await repositories.runs.activeOnBench(manager.bench.id);
  if (!unfinished) return null;
  const { runId } = unfinished;
  const state = await foldJournal(repositories.journal, runId);
  if (state.status === "empty") {
    await repositories.runs.forget(runId);
    return null;
  }
  // The list entry may be behind a journal that was written to its end just before the crash.
  await repositories.runs.updateSummary(summariseRun(runId, state));
  if (isOver(state.status)) return null;
  const recorder = manager.adopt(runId, state);
  if (state.status === "running") await tellInterruption(recorder, trouble, manager);
  return { runId };
}

async function tellInterruption(recorder: RunRecorder, trouble: Trouble | null, manager: BenchManager): Promise<void> {
  const { state } = recorder;
  if (trouble) recorder.note({ type: "output.unproven", data: { reason: trouble.message } });
  else recorder.note({ type: "output.off-proven", data: { terminalVolts: manager.snapshot().output.volts ?? 0 } });
  await recorder.record({ type: "run.interrupted", data: { reason: interruptionReason(state, trouble) } });
}

function interruptionReason(state: RunState, trouble: Trouble | null): string {
  const index = state.active?.point ?? nextPoint(state);
  const where = index === null ? "after its last point" : `at point ${index + 1}, ${pointName(state.setup, index)}`;
  const output = trouble
    ? "The output is not proven off: treat the terminals as live."
    : "The output is off and proven off.";
  return `Stepwell stopped running ${where}. ${output}`;
}
