import type { ReplayTimeline } from "./replay-timeline";

/** Pauses of the run longer than this are passed over: nobody wants to watch a night during which the run was held. */
const LONGEST_WAIT_MS = 10_000;

/** Run time after `passedMs` of the viewer's time at `speed`, from `elapsedMs` on. Long pauses are jumped to their end. */
export function advance(timeline: ReplayTimeline, elapsedMs: number, passedMs: number, speed: number): number {
  const aim = elapsedMs + passedMs * speed;
  const seq = timeline.seqAt(aim);
  if (seq >= timeline.lastSeq) return timeline.lastElapsedMs;
  const nextMs = timeline.elapsedMsAt(seq + 1);
  const isPause = nextMs - timeline.elapsedMsAt(seq) > LONGEST_WAIT_MS;
  return isPause && aim > timeline.elapsedMsAt(seq) ? nextMs : aim;
}
