"use client";

import { Button, type ButtonSize } from "@/components/ui/button";
import { classNames } from "@/components/ui/class-names";
import type { RunCommands as Commands } from "@/lib/client/use-command";
import { allowedCommands } from "@/lib/journal/selectors";
import type { RunState } from "@/lib/journal/run-state";
import type { RunRights } from "./run-rights";

export interface RunCommandsProps {
  state: RunState;
  rights: RunRights;
  commands: Commands;
  size?: ButtonSize;
  /** Skipping needs the whole picture: left out on a phone and on a bench's band. */
  canSkip?: boolean;
  /** Buttons share the width. */
  isWide?: boolean;
}

/** Hold or Resume, Skip, and Stop: always last, so that it always stands in the same corner. */
export function RunCommands(props: RunCommandsProps) {
  const { state, rights, commands, size = "normal", canSkip = true, isWide = false } = props;
  const allowed = allowedCommands(state).filter((kind) => rights[kind]);
  const looks = classNames(isWide && "flex-1");
  return (
    <>
      {allowed.includes("hold") && (
        <Button
          size={size}
          className={looks}
          busy={commands.pending === "hold"}
          aria-keyshortcuts="H"
          onClick={() => void commands.send("hold")}
        >
          Hold
        </Button>
      )}
      {allowed.includes("resume") && (
        <Button
          size={size}
          variant="main"
          className={looks}
          busy={commands.pending === "resume"}
          aria-keyshortcuts="H"
          onClick={() => void commands.send("resume")}
        >
          Resume
        </Button>
      )}
      {canSkip && allowed.includes("skip") && (
        <Button
          size={size}
          className={looks}
          busy={commands.pending === "skip"}
          aria-keyshortcuts="S"
          onClick={() => void commands.send("skip")}
        >
          Skip point
        </Button>
      )}
      {allowed.includes("stop") && (
        // Never disabled while under way: a second press of Stop is a repetition under the same id.
        <Button
          size={size}
          variant="stop"
          className={looks}
          aria-keyshortcuts="Shift+Escape"
          onClick={() => void commands.send("stop")}
        >
          {commands.pending === "stop" ? "Stopping" : "Stop"}
        </Button>
      )}
    </>
  );
}
