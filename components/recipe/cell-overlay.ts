import type { ExcludedPoint, Plan, PlannedPoint } from "@/lib/schemas/plan";
import type { MatrixCell } from "@/lib/schemas/recipe";
import { formatDuration, THIN_SPACE } from "@/lib/units/format";

/** What the cells of a recipe's matrix tell. */
export const overlays = [
  { value: "time", label: "Time" },
  { value: "limit", label: "Limit" },
  { value: "uncertainty", label: "Uncertainty" },
] as const;
export type Overlay = (typeof overlays)[number]["value"];

export type CellState =
  { kind: "planned"; point: PlannedPoint } | { kind: "left-out" } | { kind: "forced-out"; excluded: ExcludedPoint };

export function cellKey({ nominalOhms, testVolts }: MatrixCell): string {
  return `${nominalOhms} ${testVolts}`;
}

/** Every cell of a plan, by its key. */
export function cellsOf(plan: Plan): ReadonlyMap<string, CellState> {
  const planned = plan.points.map((point): [string, CellState] => [cellKey(point), { kind: "planned", point }]);
  const excluded = plan.excluded.map((cell): [string, CellState] => [
    cellKey(cell),
    cell.cause === "recipe" ? { kind: "left-out" } : { kind: "forced-out", excluded: cell },
  ]);
  return new Map([...planned, ...excluded]);
}

/** What stands in a cell: `14 s`, `± 2.2 %`, `0.60 %`. */
export function overlayText(point: PlannedPoint, overlay: Overlay): string {
  switch (overlay) {
    case "time":
      return shortDuration(point.forecastSeconds);
    case "limit":
      return point.limitOhms === null ? "not stated" : `±${THIN_SPACE}${percent(point.limitOhms, point)}`;
    case "uncertainty":
      return percent(point.standardUncertaintyOhms, point);
  }
}

/** How deep a cell is tinted, 0 to 1: the greater of a plan's figures, the deeper, by its logarithm. */
export function overlayDepth(point: PlannedPoint, overlay: Overlay, plan: Plan): number {
  const figures = plan.points.map((other) => overlayFigure(other, overlay)).filter((figure) => figure > 0);
  const figure = overlayFigure(point, overlay);
  const [least, most] = [Math.min(...figures), Math.max(...figures)];
  if (!(figure > 0) || most <= least) return 0;
  return Math.log(figure / least) / Math.log(most / least);
}

function overlayFigure(point: PlannedPoint, overlay: Overlay): number {
  if (overlay === "time") return point.forecastSeconds;
  const ohms = overlay === "limit" ? (point.limitOhms ?? 0) : point.standardUncertaintyOhms;
  return ohms / point.standardOhms;
}

function percent(ohms: number, { standardOhms }: PlannedPoint): string {
  return `${((100 * ohms) / standardOhms).toPrecision(2)}${THIN_SPACE}%`;
}

function shortDuration(seconds: number): string {
  if (seconds < 60) return formatDuration(seconds);
  return seconds < 3600 ? `${(seconds / 60).toFixed(1)}${THIN_SPACE}min` : formatDuration(seconds);
}

const forcedWords: Readonly<Record<ExcludedPoint["cause"], string>> = {
  recipe: "left out",
  rating: "rating",
  setting: "no setting",
  unit: "not on unit",
  bench: "bench",
};

/** One or two words for a cell that cannot be run. */
export function forcedWord({ cause }: ExcludedPoint): string {
  return forcedWords[cause];
}
