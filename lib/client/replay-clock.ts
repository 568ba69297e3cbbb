import type { ReplayTimeline } from "./replay-timeline";

/** Pauses of the run longer than this are passed over: nobody wants to watch a night during which the run was held. */
const LONGEST_WAIT_MS = 10_000;
/** How long, in the viewer's time, such a pause is shown before it is left. */
const PAUSE_SHOWN_MS = 1500;

/** Run time after `passedMs` of the viewer's time at `speed`, from `elapsedMs` on. */
export function advance(timeline: ReplayTimeline, elapsedMs: number, passedMs: number, speed: number): number {
  const aim = elapsedMs + passedMs * speed;
  const seq = timeline.seqAt(aim);
  if (seq >= timeline.lastSeq) return timeline.lastElapsedMs;
  const pauseFromMs = timeline.elapsedMsAt(seq);
  const pauseToMs = timeline.elapsedMsAt(seq + 1);
  const isLongPause = pauseToMs - pauseFromMs > LONGEST_WAIT_MS;
  return isLongPause && aim - pauseFromMs > PAUSE_SHOWN_MS * speed ? pauseToMs : aim;
}
