import type { RunState } from "@/lib/journal/run-state";
import { stateSentence, type StateSentence } from "@/lib/journal/state-sentence";

const TIME = new Intl.DateTimeFormat("en-GB", { hour: "2-digit", minute: "2-digit", second: "2-digit" });

/** `14:20:31` by this reader's clock. For the browser only: the server's zone may differ. */
export function timeOfDay(atMs: number): string {
  return TIME.format(atMs);
}

/** `21:40`, `1:05:09`: a run time as a counter shows it. */
export function counter(elapsedMs: number): string {
  const whole = Math.max(0, Math.floor(elapsedMs / 1000));
  const [h, min, s] = [Math.floor(whole / 3600), Math.floor((whole % 3600) / 60), whole % 60];
  const tail = `${String(min).padStart(2, "0")}:${String(s).padStart(2, "0")}`;
  return h > 0 ? `${h}:${tail}` : tail;
}

/** The word Replay comes first, so that nobody takes the page for live. */
export function replaySentence(state: RunState): StateSentence {
  const { lead, rest } = stateSentence(state);
  const then = `${lead.charAt(0).toLowerCase()}${lead.slice(1)}${rest ? ` ${rest}` : ""}`;
  return { lead: "Replay", rest: `${timeOfDay(state.atMs)}, ${then}`, tone: "plum" };
}
