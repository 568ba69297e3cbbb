import { Button } from "@/components/ui/button";
import { Note } from "@/components/ui/note";
import type { RunState } from "@/lib/journal/run-state";
import { isOver, nextPoint } from "@/lib/journal/selectors";
import { pointName } from "@/lib/journal/describe-event";
import { stateSentence } from "@/lib/journal/state-sentence";
import type { Room } from "@/lib/schemas/bench";
import { roomChange } from "./room-change";
import { runPath } from "./run-links";

export interface RunNoticesProps {
  runId: string;
  state: RunState;
  /** The room at this moment, where the bench knows it. */
  room: Room | null;
  canResume: boolean;
  /** Why the latest command did not act. */
  failure: string | null;
}

/** What a person at this page can do: about a failed command, about a run that stands still, about one that is over. */
export function RunNotices({ runId, state, room, canResume, failure }: RunNoticesProps) {
  return (
    <>
      {failure && (
        <Note tone="bad" alert>
          {failure}
        </Note>
      )}
      <StandstillNote state={state} room={room} canResume={canResume} />
      {isOver(state.status) && <EndNote runId={runId} state={state} />}
    </>
  );
}

function StandstillNote({ state, room, canResume }: Pick<RunNoticesProps, "state" | "room" | "canResume">) {
  const change = roomChange(state.setup?.room, room);
  const next = resumeWords(state, canResume);
  switch (state.status) {
    case "faulted":
      return <Note tone="bad">{[state.trouble?.cure, change, next].filter(Boolean).join(" ")}</Note>;
    case "interrupted":
      return (
        <Note tone="look">
          {["Nothing switches the output on by itself: look at the bench first.", change, next]
            .filter(Boolean)
            .join(" ")}
        </Note>
      );
    case "held":
      return <Note tone="look">{["The output is off.", change, next].filter(Boolean).join(" ")}</Note>;
    default:
      return null;
  }
}

/** Where Resume goes on, or who may. */
function resumeWords(state: RunState, canResume: boolean): string | null {
  const point = nextPoint(state);
  if (point === null) return null;
  const attempts = state.points[point]?.attempts ?? 0;
  const again = attempts > 0 ? `, as attempt ${attempts + 1}` : "";
  return canResume
    ? `Resume measures ${pointName(state.setup, point)} next${again}.`
    : "A technician or an engineer can resume it.";
}

function EndNote({ runId, state }: { runId: string; state: RunState }) {
  const { lead, rest, tone } = stateSentence(state);
  const words = [lead, rest].filter(Boolean).join(tone === "ochre" ? " " : ", ");
  return (
    <Note
      tone={tone === "moss" ? "ok" : tone === "brick" ? "bad" : "look"}
      title="The run is over."
      action={
        <Button href={runPath(runId, "results")} variant="main">
          Results
        </Button>
      }
    >
      {words}.
    </Note>
  );
}
