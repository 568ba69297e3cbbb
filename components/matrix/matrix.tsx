"use client";

import { useState, type KeyboardEvent } from "react";
import type { RunState } from "@/lib/journal/run-state";
import { formatOhms, formatTestVolts } from "@/lib/units/format";
import { Legend } from "@/components/marks/legend";
import type { PointVerdict } from "@/components/marks/verdict";
import { classNames } from "@/components/ui/class-names";
import { ExcludedList } from "./excluded-list";
import { CellContent, cellLooks, cellTitle } from "./matrix-cell";
import { matrixTable, type MatrixCell, type MatrixTable } from "./matrix-cells";
import { placeAfterArrow, type MatrixPlace } from "./matrix-place";

export interface MatrixProps {
  state: RunState;
  /** What the table shows, for assistive technology. */
  caption?: string;
  /** Makes the cells of planned points buttons; arrows move between them. */
  onSelect?: (pointIndex: number) => void;
  /** The point that the page shows elsewhere. */
  selected?: number | null;
  legend?: boolean;
  /** Values are old: they are drawn in the ink of what is off. */
  stale?: boolean;
}

/** Resistances down, test voltages across, the error of each point in per cent of the standard's value. */
export function Matrix(props: MatrixProps) {
  const { state, caption = "Error of each point in per cent of the standard’s value", legend = true, stale } = props;
  const table = matrixTable(state);
  // Cells that are buttons bring themselves into view; otherwise the keyboard scrolls the table as a whole.
  const scrolled = props.onSelect ? {} : { tabIndex: 0, role: "group", "aria-label": caption };
  return (
    <div className={classNames("px-2.5 pt-2 pb-3", stale && "opacity-60")}>
      <div className="overflow-x-auto" {...scrolled}>
        <table
          className="w-full table-fixed border-separate border-spacing-[3px]"
          style={{ minWidth: `${5.75 + table.testVolts.length * 7.3}rem` }}
        >
          <caption className="sr-only">{caption}</caption>
          <MatrixHead testVolts={table.testVolts} />
          <MatrixBody table={table} {...props} />
        </table>
      </div>
      {legend && <Legend className="px-1 pt-2" verdicts={verdictsIn(table)} excluded={table.excluded.length > 0} />}
      <ExcludedList excluded={table.excluded} />
    </div>
  );
}

/** The verdicts that a run always can come to, and whichever else has come up. */
function verdictsIn(table: MatrixTable): PointVerdict[] {
  const cells = table.rows.flatMap((row) => row.cells);
  const has = (verdict: PointVerdict) =>
    cells.some((cell) => cell.kind === verdict || (cell.kind === "judged" && cell.judgement.verdict === verdict));
  return [
    "inside",
    ...(["doubtful"] as const).filter(has),
    "outside",
    "unsettled",
    ...(["not-stated", "skipped"] as const).filter(has),
  ];
}

function MatrixHead({ testVolts }: { testVolts: readonly number[] }) {
  return (
    <thead>
      <tr>
        <td className="w-23" />
        {testVolts.map((volts) => (
          <th
            key={volts}
            scope="col"
            className="px-1 pt-0.5 pb-1.5 text-center font-mono text-[0.84375rem] leading-4 font-semibold tabular"
          >
            {formatTestVolts(volts)}
          </th>
        ))}
      </tr>
    </thead>
  );
}

function MatrixBody({ table, onSelect, selected = null }: MatrixProps & { table: MatrixTable }) {
  const [place, setPlace] = useState<MatrixPlace | null>(null);
  const tabStop = place ?? firstPlanned(table);
  const moveBy = (event: KeyboardEvent<HTMLElement>) => {
    const next = tabStop && placeAfterArrow(event.key, tabStop, table);
    if (!next) return;
    event.preventDefault();
    setPlace(next);
    event.currentTarget.querySelector<HTMLElement>(`[data-place="${next.row}-${next.column}"]`)?.focus();
  };
  return (
    <tbody onKeyDown={onSelect && moveBy}>
      {table.rows.map((row, rowIndex) => (
        <tr key={row.nominalOhms}>
          <th
            scope="row"
            className="sticky left-0 z-10 bg-panel pr-2 text-right font-mono text-[0.84375rem] font-medium whitespace-nowrap tabular"
          >
            {formatOhms(row.nominalOhms)}
          </th>
          {row.cells.map((cell, column) => (
            <td
              key={column}
              title={cellTitle(cell)}
              data-cell={cell.kind}
              className={classNames(
                "relative isolate h-7.75 overflow-hidden rounded border p-0 font-mono text-[0.8125rem] leading-none font-medium tabular",
                cellLooks(cell),
                "point" in cell && cell.point.index === selected && "outline-2 outline-ink",
              )}
            >
              <CellBox
                cell={cell}
                place={`${rowIndex}-${column}`}
                isTabStop={tabStop?.row === rowIndex && tabStop.column === column}
                onSelect={onSelect}
                onFocus={() => setPlace({ row: rowIndex, column })}
              />
            </td>
          ))}
        </tr>
      ))}
    </tbody>
  );
}

interface CellBoxProps {
  cell: MatrixCell;
  place: string;
  isTabStop: boolean;
  onSelect?: (pointIndex: number) => void;
  onFocus: () => void;
}

const BOX = "flex h-7.25 w-full items-center justify-between gap-1 px-1.5 whitespace-nowrap";

function CellBox({ cell, place, isTabStop, onSelect, onFocus }: CellBoxProps) {
  if (!onSelect || !("point" in cell)) {
    return (
      <div className={BOX}>
        <CellContent cell={cell} />
      </div>
    );
  }
  const { index } = cell.point;
  return (
    <button
      type="button"
      data-place={place}
      tabIndex={isTabStop ? 0 : -1}
      onFocus={onFocus}
      onClick={() => onSelect(index)}
      className={classNames(BOX, "-outline-offset-2")}
    >
      <CellContent cell={cell} />
    </button>
  );
}

function firstPlanned(table: MatrixTable): MatrixPlace | null {
  for (const [row, { cells }] of table.rows.entries()) {
    const column = cells.findIndex((cell) => "point" in cell);
    if (column >= 0) return { row, column };
  }
  return null;
}
