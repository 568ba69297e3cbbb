import { formatErrorPercent, formatOhms, formatTestVolts } from "@/lib/units/format";
import { VERDICT_INKS, VERDICT_WORDS } from "@/components/marks/verdict";
import { DataTable, TableHead, type Column } from "@/components/ui/data-table";
import { resistancesOf, type ErrorPoint, type ErrorSeries } from "./error-series";

/** The error chart's figures. */
export function ErrorTable({ series }: { series: readonly ErrorSeries[] }) {
  const columns: Column[] = [
    { id: "resistance", label: "Resistance", align: "right" },
    ...series.map(({ testVolts }) => ({
      id: String(testVolts),
      label: formatTestVolts(testVolts),
      align: "right" as const,
    })),
  ];
  return (
    <DataTable caption="Errors in per cent by resistance and test voltage" captionShown dense>
      <TableHead columns={columns} />
      <tbody>
        {resistancesOf(series).map((nominalOhms) => (
          <tr key={nominalOhms}>
            <th scope="row" className="figure font-medium">
              {formatOhms(nominalOhms)}
            </th>
            {series.map(({ testVolts, points }) => (
              <ErrorCell key={testVolts} point={points.find((point) => point.nominalOhms === nominalOhms)} />
            ))}
          </tr>
        ))}
      </tbody>
    </DataTable>
  );
}

function ErrorCell({ point }: { point: ErrorPoint | undefined }) {
  if (!point) return <td className="figure text-ink-2">–</td>;
  const error = point.errorPercent === null ? "over range" : formatErrorPercent(point.errorPercent);
  return (
    <td className="figure">
      {error}{" "}
      {point.verdict !== "inside" && (
        <span className={VERDICT_INKS[point.verdict]}>{VERDICT_WORDS[point.verdict]}</span>
      )}
    </td>
  );
}
