"use client";

import type { RunCommands } from "@/lib/client/use-command";
import { useShortcuts } from "@/lib/client/use-shortcuts";
import { allowedCommands } from "@/lib/journal/selectors";
import type { RunState } from "@/lib/journal/run-state";
import type { RunCommand } from "@/lib/schemas/run";
import type { RunRights } from "./run-rights";

/** H holds or resumes, S skips, Shift+Escape stops; what the state or the rights don't allow does nothing. */
export function useRunKeys(state: RunState, rights: RunRights, commands: RunCommands): RunCommand["kind"][] {
  const allowed = allowedCommands(state).filter((kind) => rights[kind]);
  const commandIf = (kind: RunCommand["kind"]) => (allowed.includes(kind) ? () => void commands.send(kind) : undefined);
  useShortcuts({
    h: commandIf("hold") ?? commandIf("resume"),
    s: commandIf("skip"),
    "Shift+Escape": commandIf("stop"),
  });
  return allowed;
}

/** The keys in words: `H holds, S skips, Shift+Esc stops`. */
export function keyWords(allowed: readonly RunCommand["kind"][]): string {
  const words = [
    allowed.includes("hold") && "H holds",
    allowed.includes("resume") && "H resumes",
    allowed.includes("skip") && "S skips",
    allowed.includes("stop") && "Shift+Esc stops",
  ];
  return words.filter(Boolean).join(", ");
}
