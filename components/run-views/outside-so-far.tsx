import { Sliver, sliverProps } from "@/components/marks/sliver";
import { DataTable } from "@/components/ui/data-table";
import { Panel } from "@/components/ui/panel";
import type { RunState } from "@/lib/journal/run-state";
import { formatErrorPercent, formatOhms, formatTestVolts } from "@/lib/units/format";

/** The points outside their limits, newest first: what a person away from the bench asks for. */
export function OutsideSoFar({ state }: { state: RunState }) {
  const outside = (state.setup?.plan.points ?? [])
    .flatMap((planned) => {
      const judgement = state.points[planned.index]?.judgement;
      return judgement?.verdict === "outside" ? [{ planned, judgement }] : [];
    })
    .reverse();
  return (
    <Panel title="Outside so far" right={outside.length > 0 ? String(outside.length) : undefined} padding="flush">
      {outside.length === 0 ? (
        <p className="px-3.5 py-3 text-ink-2">No point is outside its limit.</p>
      ) : (
        <DataTable caption="Points outside their limits: resistance, voltage, error in per cent">
          <tbody>
            {outside.map(({ planned, judgement }) => (
              <tr key={planned.index}>
                <td className="figure">{formatOhms(planned.nominalOhms)}</td>
                <td className="figure">{formatTestVolts(planned.testVolts)}</td>
                <td className="figure font-bold text-brick">
                  {judgement.errorPercent === null ? "over range" : formatErrorPercent(judgement.errorPercent)}
                </td>
                <td className="w-20">
                  <Sliver {...sliverProps(judgement)} />
                </td>
              </tr>
            ))}
          </tbody>
        </DataTable>
      )}
    </Panel>
  );
}
