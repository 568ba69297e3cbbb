import type { ActivePoint, RunState } from "@/lib/journal/run-state";
import type { ExcludedPoint, PlannedPoint } from "@/lib/schemas/plan";
import type { Judgement } from "@/lib/schemas/run-event";

export type MatrixCell =
  | { kind: "judged"; point: PlannedPoint; judgement: Judgement }
  | { kind: "present"; point: PlannedPoint; active: ActivePoint }
  | { kind: "open"; point: PlannedPoint }
  | { kind: "skipped"; point: PlannedPoint }
  | { kind: "excluded"; reason: string }
  /** Neither planned nor excluded: no section of the recipe has it. */
  | { kind: "absent" };

export interface MatrixTable {
  testVolts: number[];
  rows: { nominalOhms: number; cells: MatrixCell[] }[];
  excluded: ExcludedPoint[];
}

/** Resistances down, voltages across, both rising; what each cell has come to. */
export function matrixTable(state: RunState): MatrixTable {
  const plan = state.setup?.plan ?? { points: [], excluded: [] };
  const places = [...plan.points, ...plan.excluded];
  const testVolts = rising(places.map((place) => place.testVolts));
  const points = pointsByPlace(plan.points);
  const excluded = new Map(plan.excluded.map((cell) => [placeKey(cell), cell]));
  const cellAt = (nominalOhms: number, volts: number): MatrixCell => {
    const key = placeKey({ nominalOhms, testVolts: volts });
    const here = points.get(key);
    if (here) return foremost(here.map((point) => pointCell(state, point)));
    const reason = excluded.get(key)?.reason;
    return reason === undefined ? { kind: "absent" } : { kind: "excluded", reason };
  };
  const rows = rising(places.map((place) => place.nominalOhms)).map((nominalOhms) => ({
    nominalOhms,
    cells: testVolts.map((volts) => cellAt(nominalOhms, volts)),
  }));
  return { testVolts, rows, excluded: plan.excluded };
}

function pointsByPlace(points: readonly PlannedPoint[]): Map<string, PlannedPoint[]> {
  const places = new Map<string, PlannedPoint[]>();
  for (const point of points) places.set(placeKey(point), [...(places.get(placeKey(point)) ?? []), point]);
  return places;
}

function pointCell(state: RunState, point: PlannedPoint): MatrixCell {
  const progress = state.points[point.index];
  if (state.active?.point === point.index) return { kind: "present", point, active: state.active };
  if (progress?.judgement) return { kind: "judged", point, judgement: progress.judgement };
  return { kind: progress?.outcome === "skipped" ? "skipped" : "open", point };
}

/** Two sections may hold the same cell: the present one is shown, else the latest that has come to something. */
function foremost(cells: MatrixCell[]): MatrixCell {
  return cells.find((cell) => cell.kind === "present") ?? cells.findLast((cell) => cell.kind !== "open") ?? cells[0]!;
}

function placeKey({ nominalOhms, testVolts }: { nominalOhms: number; testVolts: number }): string {
  return `${nominalOhms}@${testVolts}`;
}

function rising(values: number[]): number[] {
  return [...new Set(values)].sort((a, b) => a - b);
}
