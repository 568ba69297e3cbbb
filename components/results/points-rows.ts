import type { RunState } from "@/lib/journal/run-state";
import type { PlannedPoint } from "@/lib/schemas/plan";
import type { Judgement } from "@/lib/schemas/run-event";
import type { PointVerdict } from "@/components/marks/verdict";
import type { Sort } from "@/components/ui/data-table";

export interface PointRow {
  point: PlannedPoint;
  /** Null for a skipped point. */
  judgement: Judgement | null;
  verdict: PointVerdict;
}

export const POINTS_FILTERS = ["all", "outside-and-doubtful"] as const;
export type PointsFilter = (typeof POINTS_FILTERS)[number];

export const POINTS_COLUMNS = [
  "order",
  "nominal",
  "voltage",
  "standard",
  "indication",
  "error",
  "limit",
  "uncertainty",
  "ratio",
  "verdict",
  "settled",
] as const;
export type PointsColumn = (typeof POINTS_COLUMNS)[number];

/** Points that were judged or skipped, in the order of the run. */
export function pointRows(state: RunState): PointRow[] {
  return (state.setup?.plan.points ?? []).flatMap((point): PointRow[] => {
    const progress = state.points[point.index];
    if (progress?.judgement) return [{ point, judgement: progress.judgement, verdict: progress.judgement.verdict }];
    return progress?.outcome === "skipped" ? [{ point, judgement: null, verdict: "skipped" }] : [];
  });
}

/** Everything that asks for a look: outside, doubtful, and what could not be judged properly. */
export function filterRows(rows: readonly PointRow[], filter: PointsFilter): PointRow[] {
  return filter === "all"
    ? [...rows]
    : rows.filter(({ verdict }) => verdict === "outside" || verdict === "doubtful" || verdict === "unsettled");
}

/** Rows by one column; what a row does not have comes last in either direction, equal rows keep the run's order. */
export function sortRows(rows: readonly PointRow[], { column, direction }: Sort<PointsColumn>): PointRow[] {
  const sign = direction === "rising" ? 1 : -1;
  return rows.toSorted((a, b) => {
    const [first, second] = [sortKey(a, column), sortKey(b, column)];
    if (first === null || second === null) return Number(first === null) - Number(second === null);
    return sign * (first - second) || a.point.index - b.point.index;
  });
}

const VERDICT_ORDER: readonly PointVerdict[] = ["inside", "doubtful", "outside", "unsettled", "not-stated", "skipped"];

function sortKey({ point, judgement, verdict }: PointRow, column: PointsColumn): number | null {
  switch (column) {
    case "order":
      return point.index;
    case "nominal":
      return point.nominalOhms;
    case "voltage":
      return point.testVolts;
    case "verdict":
      return VERDICT_ORDER.indexOf(verdict);
    default:
      return judgement && judgedKey(judgement, column);
  }
}

function judgedKey(
  judgement: Judgement,
  column: Exclude<PointsColumn, "order" | "nominal" | "voltage" | "verdict">,
): number | null {
  switch (column) {
    case "standard":
      return judgement.standardOhms;
    case "indication":
      return judgement.indicationOhms ?? Infinity;
    case "error":
      return judgement.errorPercent;
    case "limit":
      return judgement.limitPercent;
    case "uncertainty":
      return judgement.uncertainty?.expandedOhms ?? null;
    case "ratio":
      return errorRatio(judgement);
    case "settled":
      return judgement.settlingSeconds;
  }
}

/** Error as a multiple of its limit, without sign; infinite when the display was over its range. */
export function errorRatio({ errorOhms, limitOhms }: Judgement): number | null {
  if (limitOhms === null) return null;
  return errorOhms === null ? Infinity : Math.abs(errorOhms) / limitOhms;
}
