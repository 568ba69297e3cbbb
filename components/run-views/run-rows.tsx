import Link from "next/link";
import type { ReactNode } from "react";
import { StairLine } from "@/components/marks/stair-line";
import { classNames } from "@/components/ui/class-names";
import { formatDay } from "@/components/runs-list/format-day";
import { DataTable } from "@/components/ui/data-table";
import { Panel } from "@/components/ui/panel";
import type { RunSummary } from "@/lib/schemas/run";
import { OutcomeWord } from "./outcome-word";
import { runPath } from "./run-links";

export interface RunRowsProps {
  title: string;
  rows: readonly RunSummary[];
  /** What stands there when no run fits. */
  empty: string;
  right?: ReactNode;
  /** Shows each run's stair line. */
  withStairs?: boolean;
}

/** A short list of runs, each a way into the run. */
export function RunRows({ title, rows, empty, right, withStairs = false }: RunRowsProps) {
  return (
    <Panel title={title} right={right} padding="flush">
      {rows.length === 0 ? (
        <p className="px-3.5 py-3 text-ink-2">{empty}</p>
      ) : (
        <DataTable caption={title}>
          <tbody>
            {rows.map((run) => (
              <tr key={run.id}>
                <td className="w-12 font-mono tabular">{run.number}</td>
                <td>
                  <Link
                    href={runPath(run.id)}
                    className="whitespace-nowrap text-ink underline-offset-3 hover:underline"
                  >
                    {run.unitName}, {run.assetNumber}
                  </Link>
                </td>
                <td
                  className={classNames("whitespace-nowrap text-ink-2 max-sm:hidden", withStairs && "max-2xl:hidden")}
                >
                  {formatDay(run.startedAtMs)}
                </td>
                {withStairs && (
                  <td className="w-40 max-xl:hidden">
                    <StairLine groups={run.stairs} size="small" />
                  </td>
                )}
                <td>
                  <OutcomeWord run={run} />
                </td>
              </tr>
            ))}
          </tbody>
        </DataTable>
      )}
    </Panel>
  );
}
