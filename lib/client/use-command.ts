"use client";

import { useCallback, useState } from "react";
import { api } from "./api";
import { failureMessage } from "./api-error";
import { createCommandSender, type CommandKind } from "./command-sender";
import { randomId } from "./random-id";

export interface RunCommands {
  send(kind: CommandKind, reason?: string | null): Promise<void>;
  /** The command that is on its way. */
  pending: CommandKind | null;
  /** Why the latest command did not act, in words. */
  failure: string | null;
}

/** Commands to one run. */
export function useCommand(runId: string): RunCommands {
  const [sender] = useState(() =>
    createCommandSender({
      post: (command) => api.commandRun(runId, command),
      newId: randomId,
      pause: (ms) => new Promise((resolve) => setTimeout(resolve, ms)),
    }),
  );
  const [pending, setPending] = useState<CommandKind | null>(null);
  const [failure, setFailure] = useState<string | null>(null);

  const send = useCallback(
    async (kind: CommandKind, reason: string | null = null) => {
      setPending(kind);
      setFailure(null);
      await sender(kind, reason).catch((error: unknown) =>
        setFailure(`${COMMAND_FAILED[kind]} ${failureMessage(error)}`),
      );
      setPending((current) => (current === kind ? null : current));
    },
    [sender],
  );
  return { send, pending, failure };
}

const COMMAND_FAILED: Readonly<Record<CommandKind, string>> = {
  hold: "Not held.",
  resume: "Not resumed.",
  skip: "Not skipped.",
  stop: "Stop was not confirmed.",
};
