"use client";

import type { RunState } from "@/lib/journal/run-state";
import type { Judgement } from "@/lib/schemas/run-event";
import { formatDuration, formatErrorPercent, formatOhms, formatTestVolts } from "@/lib/units/format";
import { Sliver, sliverProps } from "@/components/marks/sliver";
import { VerdictWord } from "@/components/marks/verdict";
import { DataTable, TableHead, type Column, type Sort } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { Panel } from "@/components/ui/panel";
import { Segmented } from "@/components/ui/segmented";
import { filterRows, pointRows, sortRows, type PointRow, type PointsColumn, type PointsFilter } from "./points-rows";

/** Filter and order; the page keeps them in its address. */
export interface PointsView {
  filter: PointsFilter;
  sort: Sort<PointsColumn>;
}

export const defaultPointsView: PointsView = { filter: "all", sort: { column: "order", direction: "rising" } };

export interface PointsTableProps {
  state: RunState;
  view: PointsView;
  onView: (view: PointsView) => void;
  /** Makes the number of each row a button, for example to see the point in the replay. */
  onSelect?: (pointIndex: number) => void;
}

/** The judged points of a run with all their figures. */
export function PointsTable({ state, view, onView, onSelect }: PointsTableProps) {
  const rows = pointRows(state);
  const shown = sortRows(filterRows(rows, view.filter), view.sort);
  const hasUncertainty = rows.some(({ judgement }) => judgement?.uncertainty);
  return (
    <Panel
      title="Points"
      padding="flush"
      note={<FilterChoice all={rows.length} view={view} onView={onView} />}
      right={`${shown.length} of ${rows.length} shown`}
    >
      {shown.length === 0 ? (
        <EmptyState
          title={rows.length === 0 ? "No point has been judged yet" : "Nothing outside, nothing doubtful"}
          text={rows.length === 0 ? "Each point appears here as it is judged." : "All judged points lie inside."}
        />
      ) : (
        <DataTable caption="Points of the run with error, limit and verdict">
          <TableHead
            columns={columnsFor(hasUncertainty)}
            sort={view.sort}
            onSort={(sort) => onView({ ...view, sort })}
          />
          <tbody>
            {shown.map((row) => (
              <Row key={row.point.index} row={row} hasUncertainty={hasUncertainty} onSelect={onSelect} />
            ))}
          </tbody>
        </DataTable>
      )}
    </Panel>
  );
}

function FilterChoice({ all, view, onView }: { all: number } & Pick<PointsTableProps, "view" | "onView">) {
  return (
    <Segmented
      label="Which points"
      value={view.filter}
      segments={[
        { value: "all", label: `All ${all}` },
        { value: "outside-and-doubtful", label: "Outside and doubtful" },
      ]}
      onChange={(filter) => onView({ ...view, filter })}
    />
  );
}

function columnsFor(hasUncertainty: boolean): Column<PointsColumn>[] {
  const figure = (id: PointsColumn, label: string): Column<PointsColumn> => ({
    id,
    label,
    align: "right",
    sortable: true,
  });
  return [
    figure("order", "Point"),
    figure("nominal", "Nominal"),
    figure("voltage", "Voltage"),
    figure("standard", "Standard"),
    figure("indication", "Indication"),
    figure("error", "Error %"),
    figure("limit", "Limit %"),
    ...(hasUncertainty ? [figure("uncertainty", "U %")] : []),
    { id: "ratio", label: "Of its limit", sortable: true },
    { id: "verdict", label: "Verdict", sortable: true },
    figure("settled", "Settled after"),
  ];
}

interface RowProps {
  row: PointRow;
  hasUncertainty: boolean;
  onSelect?: (pointIndex: number) => void;
}

function Row({ row: { point, judgement, verdict }, hasUncertainty, onSelect }: RowProps) {
  return (
    <tr className="hover:bg-ground">
      <td className="figure">
        <PointNumber index={point.index} onSelect={onSelect} />
      </td>
      <td className="figure">{formatOhms(point.nominalOhms)}</td>
      <td className="figure">{formatTestVolts(point.testVolts)}</td>
      {judgement ? (
        <JudgedCells judgement={judgement} hasUncertainty={hasUncertainty} />
      ) : (
        <td colSpan={hasUncertainty ? 6 : 5} className="text-ink-2">
          not measured
        </td>
      )}
      <td>
        <VerdictWord verdict={verdict} />
      </td>
      <td className="figure">{judgement ? formatDuration(judgement.settlingSeconds) : "–"}</td>
    </tr>
  );
}

function PointNumber({ index, onSelect }: { index: number; onSelect?: (pointIndex: number) => void }) {
  if (!onSelect) return index + 1;
  return (
    <button
      type="button"
      aria-label={`Show point ${index + 1}`}
      onClick={() => onSelect(index)}
      className="text-water underline underline-offset-3"
    >
      {index + 1}
    </button>
  );
}

function JudgedCells({ judgement, hasUncertainty }: { judgement: Judgement; hasUncertainty: boolean }) {
  const { standardOhms, indicationOhms, resolutionOhms, errorPercent, limitPercent, uncertainty } = judgement;
  return (
    <>
      <td className="figure">{formatOhms(standardOhms)}</td>
      <td className="figure">{indicationOhms === null ? "over range" : formatOhms(indicationOhms, resolutionOhms)}</td>
      <td className="figure font-semibold">{errorPercent === null ? "–" : formatErrorPercent(errorPercent)}</td>
      <td className="figure">{limitPercent === null ? "not stated" : `±${limitPercent.toFixed(2)}`}</td>
      {hasUncertainty && (
        <td className="figure">
          {uncertainty ? ((uncertainty.expandedOhms / standardOhms) * 100).toPrecision(2) : "–"}
        </td>
      )}
      <td>
        <Sliver {...sliverProps(judgement)} />
      </td>
    </>
  );
}
