"use client";

import type { Verdict } from "@/lib/schemas/run-event";
import { formatErrorPercent, formatExactDuration } from "@/lib/units/format";
import { Plot } from "@/components/chart/plot";
import { VERDICT_WORDS } from "@/components/marks/verdict";
import { DataTable, TableHead } from "@/components/ui/data-table";
import { runTraceKind } from "./run-trace-kind";

export interface RunTracePoint {
  /** `10.00 GΩ at 500 V`. */
  name: string;
  /** Run time at which it was judged. */
  elapsedSeconds: number;
  /** Null when the display was over its range. */
  errorPercent: number | null;
  limitPercent: number | null;
  verdict: Verdict;
}

export interface RunTraceProps {
  points: readonly RunTracePoint[];
  height?: number;
}

const COLUMNS = [
  { id: "time", label: "Run time", align: "right" },
  { id: "point", label: "Point" },
  { id: "error", label: "Error %", align: "right" },
  { id: "verdict", label: "Verdict" },
] as const;

/** All points of the run in the order of time: error and limit of each, its verdict by shape and colour. */
export function RunTrace({ points, height = 320 }: RunTraceProps) {
  return (
    <figure className="px-2 pt-2">
      <Plot kind={runTraceKind} frame={points} height={height} />
      <figcaption className="sr-only">{`Errors of ${points.length} points over the run's time; the table has them all.`}</figcaption>
      <details className="px-1.5 pb-2 text-small">
        <summary className="w-max text-water">As a table</summary>
        <DataTable caption="Errors in the order of the run" dense>
          <TableHead columns={COLUMNS} />
          <tbody>
            {points.map((point) => (
              <tr key={`${point.name} ${point.elapsedSeconds}`}>
                <td className="figure">{formatExactDuration(point.elapsedSeconds)}</td>
                <td>{point.name}</td>
                <td className="figure">
                  {point.errorPercent === null ? "over range" : formatErrorPercent(point.errorPercent)}
                </td>
                <td>{VERDICT_WORDS[point.verdict]}</td>
              </tr>
            ))}
          </tbody>
        </DataTable>
      </details>
    </figure>
  );
}
