"use client";

import { parseAsStringLiteral, useQueryStates } from "nuqs";
import { useRouter } from "next/navigation";
import { POINTS_COLUMNS, POINTS_FILTERS } from "@/components/results/points-rows";
import { defaultPointsView, PointsTable } from "@/components/results/points-table";
import type { RunState } from "@/lib/journal/run-state";
import { runPath } from "./run-links";

const VIEW = {
  points: parseAsStringLiteral(POINTS_FILTERS).withDefault(defaultPointsView.filter),
  sort: parseAsStringLiteral(POINTS_COLUMNS).withDefault(defaultPointsView.sort.column),
  direction: parseAsStringLiteral(["rising", "falling"] as const).withDefault(defaultPointsView.sort.direction),
};

/** The points table, its filter and order in the URL; a point's number leads to its moment in the replay. */
export function PointsIsland({
  runId,
  state,
  momentOf,
}: {
  runId: string;
  state: RunState;
  /** The record at which each point's trace stood complete. */
  momentOf: Readonly<Record<number, number>>;
}) {
  const router = useRouter();
  const [view, setView] = useQueryStates(VIEW, { history: "replace" });
  return (
    <PointsTable
      state={state}
      view={{ filter: view.points, sort: { column: view.sort, direction: view.direction } }}
      onView={({ filter, sort }) => void setView({ points: filter, sort: sort.column, direction: sort.direction })}
      onSelect={(point) => router.push(`${runPath(runId, "replay")}?at=${momentOf[point] ?? 1}`)}
    />
  );
}
