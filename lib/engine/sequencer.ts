import { isDriverError } from "@/drivers/driver-error";
import { nextPoint } from "@/lib/journal/selectors";
import type { NewRunEvent, Trouble } from "@/lib/schemas/run-event";
import { isEngineError } from "./engine-error";
import { measurePoint, type PointContext } from "./measure-point";
import { isAttemptInterrupted, type Interruption, type RunControl } from "./run-control";

export interface SequencerContext extends PointContext {
  control: RunControl;
}

/**
 * Runs the open points of one run to its end, or until a person or a fault ends it.
 *
 * Every way out passes through the safe state, thrown errors included, and is told in the journal.
 * Rejects only when the journal itself can't be written; the bench is in the safe state then, if it can be.
 */
export async function runSequence(context: SequencerContext): Promise<void> {
  const { recorder, control } = context;
  for (;;) {
    const index = nextPoint(recorder.state);
    if (index === null) return finish(context);
    const point = context.setup.plan.points[index]!;
    const attempt = recorder.state.points[index]!.attempts + 1;
    try {
      control.signal.throwIfAborted();
      await measurePoint(context, { point, attempt, signal: control.signal });
    } catch (error) {
      const goesOn = await endAttempt(context, index, error);
      if (!goesOn) return;
    }
  }
}

/** Tells the journal how the attempt ended, after the bench is safe. Returns whether the run goes on. */
async function endAttempt(context: SequencerContext, index: number, error: unknown): Promise<boolean> {
  const { control, recorder } = context;
  const safeTrouble = await reachSafeState(context);
  await recorder.commit();
  // Read after the waits above, so that a wish made meanwhile is not lost.
  const wish = control.interruption;
  control.answer();
  const trouble = safeTrouble ?? (wish || isAttemptInterrupted(error) ? null : describeTrouble(error));
  abandonPresent(context, trouble, wish);
  // A stop ends the run even on a bench that can't be proven safe: its output is then told as unknown.
  if (trouble && wish?.kind !== "stop") {
    await recorder.record({ type: "run.faulted", data: trouble });
    return false;
  }
  return wish ? answerWish(context, index, wish) : false;
}

/** Brings the bench to the safe state; the trouble that prevents it is noted as an unproven output and returned. */
async function reachSafeState({ safeState, recorder }: SequencerContext): Promise<Trouble | null> {
  try {
    const permit = await safeState.reach();
    recorder.note({ type: "output.off-proven", data: { terminalVolts: permit.terminalVolts } });
    return null;
  } catch (error) {
    const trouble = describeTrouble(error);
    recorder.note({ type: "output.unproven", data: { reason: trouble.message } });
    return trouble;
  }
}

function abandonPresent({ recorder }: SequencerContext, trouble: Trouble | null, wish: Interruption | null): void {
  const active = recorder.state.active;
  if (!active || wish?.kind === "skip") return;
  const reason = trouble ? trouble.message : `ended by ${wish?.by.name ?? "Stepwell"}`;
  recorder.note({ type: "point.abandoned", data: { point: active.point, attempt: active.attempt, reason } });
}

async function answerWish(context: SequencerContext, index: number, wish: Interruption): Promise<boolean> {
  await context.recorder.record(wishEvent(index, wish));
  return wish.kind === "skip";
}

function wishEvent(index: number, { kind, by, reason }: Interruption): NewRunEvent {
  switch (kind) {
    case "hold":
      return { type: "run.held", data: { by, reason } };
    case "skip":
      return { type: "point.skipped", data: { point: index, by } };
    case "stop":
      return { type: "run.stopped", data: { by, reason } };
    case "shutdown":
      return { type: "run.interrupted", data: { reason: reason ?? "Stepwell was shut down." } };
  }
}

async function finish({ recorder, safeState }: SequencerContext): Promise<void> {
  safeState.revoke();
  const { points } = recorder.state;
  const judged = points.filter((point) => point.outcome === "judged").length;
  await recorder.record({ type: "run.finished", data: { judged, skipped: points.length - judged } });
}

/** Any error as trouble in words. */
export function describeTrouble(error: unknown): Trouble {
  if (isDriverError(error)) return { code: error.code, message: error.message, cure: error.cure };
  if (isEngineError(error)) return { code: "storage", message: error.message, cure: "" };
  const detail = error instanceof Error ? error.message : String(error);
  return {
    code: "internal",
    message: `Stepwell met a fault of its own: ${detail}.`,
    cure: "The bench is held. Resume measures the point again; if it comes back, send the log to whoever looks after Stepwell.",
  };
}
