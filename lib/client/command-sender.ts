import type { RunCommand } from "@/lib/schemas/run";
import { isApiError } from "./api-error";

export type CommandKind = RunCommand["kind"];

export interface CommandSenderParts {
  post(command: RunCommand): Promise<unknown>;
  newId(): string;
  /** Waits before a send without an answer is repeated. */
  pause(ms: number): Promise<void>;
}

/** Pauses before the second and the third try. */
const PAUSES_MS = [300, 900];

/**
 * Sends commands so that each acts once: a send without an answer is repeated under the same id, twice by itself and
 * again at the next press. Rejects with ApiError when it was refused or nobody answered.
 */
export function createCommandSender({ post, newId, pause }: CommandSenderParts) {
  const unanswered = new Map<CommandKind, RunCommand>();

  return async function send(kind: CommandKind, reason: string | null = null): Promise<void> {
    const command = unanswered.get(kind) ?? { id: newId(), kind, reason };
    unanswered.set(kind, command);
    for (let tries = 0; ; tries += 1) {
      try {
        await post(command);
        unanswered.delete(kind);
        return;
      } catch (error) {
        const pauseMs = PAUSES_MS[tries];
        if (!isApiError(error) || !error.isUnanswered) unanswered.delete(kind);
        if (!isApiError(error) || !error.isUnanswered || pauseMs === undefined) throw error;
        await pause(pauseMs);
      }
    }
  };
}
