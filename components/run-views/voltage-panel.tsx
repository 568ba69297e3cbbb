import { errorSeries, type ErrorPoint } from "@/components/results/error-series";
import { DataTable, TableHead } from "@/components/ui/data-table";
import { Panel } from "@/components/ui/panel";
import type { RunState } from "@/lib/journal/run-state";
import { formatErrorPercent, formatTestVolts } from "@/lib/units/format";

const COLUMNS = [
  { id: "voltage", label: "Voltage", align: "right" },
  { id: "points", label: "Points", align: "right", className: "max-sm:hidden" },
  { id: "outside", label: "Outside", align: "right" },
  { id: "mean", label: "Mean error %", align: "right" },
  { id: "worst", label: "Greatest %", align: "right" },
] as const;

/** The errors of each test voltage in one row. */
export function VoltagePanel({ state }: { state: RunState }) {
  const series = errorSeries(state);
  if (series.length === 0) return null;
  return (
    <Panel title="By test voltage" padding="flush">
      <DataTable caption="Errors by test voltage">
        <TableHead columns={COLUMNS} />
        <tbody>
          {series.map(({ testVolts, points }) => {
            const errors = points.flatMap(({ errorPercent }) => errorPercent ?? []);
            const outside = points.filter(({ verdict }) => verdict === "outside").length;
            return (
              <tr key={testVolts}>
                <th scope="row" className="figure font-medium">
                  {formatTestVolts(testVolts)}
                </th>
                <td className="figure max-sm:hidden">{points.length}</td>
                <td className={outside > 0 ? "figure font-semibold text-brick" : "figure"}>{outside}</td>
                <td className="figure">{errors.length > 0 ? formatErrorPercent(meanOf(errors)) : "–"}</td>
                <td className="figure">{greatestWords(points)}</td>
              </tr>
            );
          })}
        </tbody>
      </DataTable>
    </Panel>
  );
}

function meanOf(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function greatestWords(points: readonly ErrorPoint[]): string {
  if (points.some(({ errorPercent, verdict }) => errorPercent === null && verdict === "outside")) return "over range";
  const errors = points.flatMap(({ errorPercent }) => errorPercent ?? []);
  const greatest = errors.reduce((most, value) => (Math.abs(value) > Math.abs(most) ? value : most), 0);
  return errors.length > 0 ? formatErrorPercent(greatest) : "–";
}
