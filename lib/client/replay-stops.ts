import type { RunEvent } from "@/lib/schemas/run-event";

/** The moments of one point: from its first attempt (or its skipping) up to what comes after it. */
export interface PointSpan {
  point: number;
  fromSeq: number;
  toSeq: number;
  /** The last moment at which its trace stands complete: before its judgement; its end when it was skipped. */
  completeSeq: number;
  isOutside: boolean;
}

/** Spans of the points in the order in which they were run. `events` may leave readings out. */
export function pointSpans(events: readonly RunEvent[], lastSeq: number): PointSpan[] {
  const spans: PointSpan[] = [];
  for (const event of events) {
    const current = spans.at(-1);
    if (event.type === "point.started" && current?.point !== event.data.point)
      spans.push(openSpan(event.data.point, event.seq));
    else if (event.type === "point.skipped" && current?.point !== event.data.point)
      spans.push(openSpan(event.data.point, event.seq));
    else if (event.type === "point.judged" && current) {
      current.completeSeq = event.seq - 1;
      current.isOutside = event.data.judgement.verdict === "outside";
    }
  }
  return spans.map((span, index) => ({ ...span, toSeq: (spans[index + 1]?.fromSeq ?? lastSeq + 1) - 1 }));
}

function openSpan(point: number, fromSeq: number): PointSpan {
  return { point, fromSeq, toSeq: fromSeq, completeSeq: fromSeq, isOutside: false };
}

/** The span of this moment; the first one before any point has begun. */
export function spanAt(spans: readonly PointSpan[], seq: number): PointSpan | null {
  return spans.findLast((span) => span.fromSeq <= seq) ?? spans[0] ?? null;
}

/** Where a moment lies on the stair line: the point and how far through it, 0 to 1. */
export function scrubPlace(spans: readonly PointSpan[], seq: number): { point: number; fraction: number } | null {
  const span = spanAt(spans, seq);
  if (!span) return null;
  const fraction = (seq - span.fromSeq) / Math.max(1, span.toSeq - span.fromSeq);
  return { point: span.point, fraction: Math.min(1, Math.max(0, fraction)) };
}

/** The moment at a place on the stair line; of a point that was never begun, the end of what was run. */
export function scrubSeq(spans: readonly PointSpan[], point: number, fraction: number, lastSeq: number): number {
  const span = spans.find((candidate) => candidate.point === point);
  if (!span) return lastSeq;
  return Math.round(span.fromSeq + fraction * (span.toSeq - span.fromSeq));
}

/** Complete trace of the next point whose end lies after this moment; null at the end. */
export function nextPointSeq(spans: readonly PointSpan[], seq: number): number | null {
  return spans.find((span) => span.completeSeq > seq)?.completeSeq ?? null;
}

/** Complete trace of the point before; null at the beginning. */
export function previousPointSeq(spans: readonly PointSpan[], seq: number): number | null {
  return spans.findLast((span) => span.completeSeq < seq && span.toSeq < seq)?.completeSeq ?? null;
}

/** Complete trace of the next point that was judged outside; null when none follows. */
export function nextOutsideSeq(spans: readonly PointSpan[], seq: number): number | null {
  return spans.find((span) => span.isOutside && span.completeSeq > seq)?.completeSeq ?? null;
}
