import { endedStatuses, type RunStatus, type VerdictCounts } from "@/lib/schemas/run";
import type { RunCondition, Verdict } from "@/lib/schemas/run-event";

export const conditionWords: Readonly<Record<RunCondition, string>> = { "as-found": "As found", "as-left": "As left" };

export const statusWords: Readonly<Record<RunStatus, string>> = {
  running: "Running",
  held: "Held",
  faulted: "Held after a fault",
  interrupted: "Interrupted",
  stopped: "Stopped",
  finished: "Finished",
};

/** What a run came to, worst first: `2 of 62 outside`, `all 62 inside`, `3 unsettled, 59 inside`. */
export function countsInWords(counts: VerdictCounts, status: RunStatus): string {
  const { inside, outside, total } = counts;
  if (total === 0) return "no points";
  if (inside === total) return total === 1 ? "the one point inside" : `all ${total} inside`;
  const notes = [
    ...(outside > 0 ? [`${outside} of ${total} outside`] : []),
    ...(counts.doubtful > 0 ? [`${counts.doubtful} doubtful`] : []),
    ...(counts.unsettled > 0 ? [`${counts.unsettled} unsettled`] : []),
    ...(counts.notStated > 0 ? [`${counts.notStated} not judged`] : []),
    ...(counts.skipped > 0 ? [`${counts.skipped} skipped`] : []),
    ...(counts.open > 0 ? [`${counts.open} ${endedStatuses.includes(status) ? "not measured" : "to come"}`] : []),
  ];
  return outside > 0 || inside === 0 ? notes.join(", ") : [`${inside} of ${total} inside`, ...notes].join(", ");
}

/** The verdict that a run's counts are marked with: the worst of its points; null where points are still missing or none says much. */
export function markOf(counts: VerdictCounts): Verdict | null {
  if (counts.outside > 0) return "outside";
  if (counts.doubtful > 0) return "doubtful";
  if (counts.unsettled > 0) return "unsettled";
  return counts.inside > 0 && counts.inside === counts.total ? "inside" : null;
}
