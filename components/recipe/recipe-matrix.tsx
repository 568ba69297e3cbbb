"use client";

import { useRef, useState, type KeyboardEvent } from "react";
import { classNames } from "@/components/ui/class-names";
import type { MatrixCell } from "@/lib/schemas/recipe";
import { formatOhms, formatTestVolts } from "@/lib/units/format";
import type { Ohms, Volts } from "@/lib/units/quantities";
import { cellKey, forcedWord, type CellState } from "./cell-overlay";
import { placeAfter, type GridPlace } from "./matrix-keys";
import { usePainting } from "./use-painting";

export interface RecipeMatrixProps {
  nominalOhms: readonly Ohms[];
  testVolts: readonly Volts[];
  isIncluded: (cell: MatrixCell) => boolean;
  /** What the plan makes of each cell; empty while there is no plan. */
  cells: ReadonlyMap<string, CellState>;
  /** Text of a planned cell, and how deep its tint is, 0 to 1. */
  describe: (state: CellState & { kind: "planned" }) => { text: string; depth: number };
  /** Makes the cells switches. */
  onChange?: (cells: readonly MatrixCell[], isIncluded: boolean) => void;
}

/** Resistances down, test voltages across. Left-out cells are hatched; cells that no bench could run say why. */
export function RecipeMatrix(props: RecipeMatrixProps) {
  const { nominalOhms, testVolts, onChange } = props;
  const table = useRef<HTMLTableElement>(null);
  const [place, setPlace] = useState<GridPlace>({ row: 0, column: 0 });
  const switchOf = usePainting(onChange);
  const present = {
    row: Math.min(place.row, nominalOhms.length - 1),
    column: Math.min(place.column, testVolts.length - 1),
  };

  const move = (event: KeyboardEvent) => {
    const next = placeAfter(event.key, present, nominalOhms.length, testVolts.length);
    if (!next) return;
    event.preventDefault();
    setPlace(next);
    const row = table.current?.tBodies[0]?.rows[next.row];
    row?.cells[next.column + 1]?.querySelector("button")?.focus();
  };

  return (
    <div className="overflow-x-auto" {...(onChange ? {} : { tabIndex: 0, role: "group", "aria-label": "Points" })}>
      <table
        ref={table}
        onKeyDown={onChange && move}
        className="w-full min-w-[26rem] table-fixed border-separate border-spacing-[3px]"
      >
        <caption className="sr-only">Points: resistances down, test voltages across</caption>
        <thead>
          <tr>
            <td className="sticky left-0 z-10 w-[92px] bg-panel max-sm:w-[84px]" />
            {testVolts.map((value) => (
              <th key={value} scope="col" className="px-1 pt-0.5 pb-1.5 text-center font-mono text-small font-semibold">
                {formatTestVolts(value)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {nominalOhms.map((ohms, row) => (
            <tr key={ohms}>
              <th scope="row" className="figure sticky left-0 z-10 bg-panel pr-2 text-small font-medium">
                {formatOhms(ohms)}
              </th>
              {testVolts.map((volts, column) => (
                <PointCell
                  key={volts}
                  {...props}
                  cell={{ nominalOhms: ohms, testVolts: volts }}
                  isPresent={present.row === row && present.column === column}
                  switchOf={switchOf}
                  onFocus={() => setPlace({ row, column })}
                />
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

interface PointCellProps extends RecipeMatrixProps {
  cell: MatrixCell;
  /** The one cell that the Tab key reaches. */
  isPresent: boolean;
  onFocus: () => void;
  switchOf: ReturnType<typeof usePainting>;
}

function PointCell({ cell, isIncluded, cells, describe, onChange, isPresent, onFocus, switchOf }: PointCellProps) {
  const isIn = isIncluded(cell);
  const state = cells.get(cellKey(cell));
  const planned = isIn && state?.kind === "planned" ? describe(state) : null;
  const forced = isIn && state?.kind === "forced-out" ? state.excluded : null;
  const text = planned?.text ?? (forced ? forcedWord(forced) : "");
  const looks = classNames(
    "h-[31px] rounded border p-0 text-center font-mono text-[0.8125rem]",
    planned || forced ? "border-transparent" : "border-line",
    !isIn && "excluded",
    forced && "bg-ochre-tint text-label",
  );
  const tint = planned
    ? { background: `color-mix(in srgb, var(--water) ${Math.round(4 + 38 * planned.depth)}%, var(--panel))` }
    : undefined;
  if (!onChange) {
    return (
      <td className={looks} style={tint} title={forced?.reason}>
        {isIn ? text : <span className="sr-only">left out</span>}
      </td>
    );
  }
  return (
    <td className={looks} style={tint} title={forced?.reason}>
      <button
        type="button"
        tabIndex={isPresent ? 0 : -1}
        aria-pressed={isIn}
        aria-label={`${formatOhms(cell.nominalOhms)} at ${formatTestVolts(cell.testVolts)}${text && `, ${text}`}`}
        onFocus={onFocus}
        {...switchOf(cell, isIn)}
        className="block size-full rounded"
      >
        {text}
      </button>
    </td>
  );
}
