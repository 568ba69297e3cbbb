import { firstStatedLimit } from "@/lib/metrology/accuracy";
import { correctedOhms, expandedUncertaintyOhms } from "@/lib/metrology/decades";
import { findSetting } from "@/lib/metrology/find-setting";
import type { Bench, Room } from "@/lib/schemas/bench";
import type { UnitModel } from "@/lib/schemas/instrument";
import type { ExcludedPoint, Plan, PlannedPoint } from "@/lib/schemas/plan";
import type { MatrixCell, RecipeDocument, ResistanceSection } from "@/lib/schemas/recipe";
import { formatTestVolts } from "@/lib/units/format";
import { volts, type Volts } from "@/lib/units/quantities";
import { forecastPointSeconds } from "./forecast";

export interface PlanRequest {
  document: RecipeDocument;
  bench: Bench;
  model: UnitModel;
  room: Room;
}

type Outcome = { ok: true; point: Omit<PlannedPoint, "index"> } | { ok: false; excluded: ExcludedPoint };

/**
 * The points of a recipe in the order in which they are run, and every cell that is not run with its cause.
 *
 * Each point carries the dial setting, the standard's corrected value in the given room, its expanded uncertainty,
 * the unit's limit there, the time constant and a forecast of its time.
 */
export function planRun({ document, bench, model, room }: PlanRequest): Plan {
  const outcomes = document.sections.flatMap((section) =>
    orderedCells(section).map((cell) => planCell(cell, section, { document, bench, model, room })),
  );
  return {
    points: outcomes
      .flatMap((outcome) => (outcome.ok ? [outcome.point] : []))
      .map((point, index) => ({ index, ...point })),
    excluded: outcomes.flatMap((outcome) => (outcome.ok ? [] : [outcome.excluded])),
  };
}

/** All cells of a section, excluded ones too: voltages rising and resistances rising within each, or the other way about. */
export function orderedCells(section: ResistanceSection): MatrixCell[] {
  const resistances = section.nominalOhms.toSorted((a, b) => a - b);
  const voltages = section.testVolts.toSorted((a, b) => a - b);
  return section.order === "by-voltage"
    ? voltages.flatMap((testVolts) => resistances.map((nominalOhms) => ({ nominalOhms, testVolts })))
    : resistances.flatMap((nominalOhms) => voltages.map((testVolts) => ({ nominalOhms, testVolts })));
}

/** Whether the recipe itself leaves the cell out. */
export function isLeftOut(section: ResistanceSection, cell: MatrixCell): boolean {
  return section.excluded.some(
    ({ nominalOhms, testVolts }) => nominalOhms === cell.nominalOhms && testVolts === cell.testVolts,
  );
}

/**
 * Highest voltage that a tester may put across a resistance: its open-circuit limit, or what its short-circuit current
 * makes of a small resistance.
 */
export function highestVoltsAt(model: UnitModel, { nominalOhms, testVolts }: MatrixCell): Volts {
  return volts(Math.min(model.openCircuitFactor * testVolts, model.shortCircuitAmperes * nominalOhms));
}

function planCell(cell: MatrixCell, section: ResistanceSection, request: PlanRequest): Outcome {
  const { bench, model } = request;
  const highestVolts = highestVoltsAt(model, cell);
  const refused = refusal(cell, section, request, highestVolts);
  if (refused) return { ok: false, excluded: { ...cell, ...refused } };
  const setting = findSetting(bench.standard, cell.nominalOhms, highestVolts);
  if (!setting.ok) return { ok: false, excluded: { ...cell, cause: setting.cause, reason: setting.reason } };
  return { ok: true, point: pointFor(cell, setting.positions, section, request) };
}

/** What forbids a cell before the standard is asked; null when nothing does. */
function refusal(
  cell: MatrixCell,
  section: ResistanceSection,
  { bench, model }: PlanRequest,
  highestVolts: number,
): Pick<ExcludedPoint, "cause" | "reason"> | null {
  if (isLeftOut(section, cell)) return { cause: "recipe", reason: "left out in the recipe" };
  if (!model.testVolts.includes(cell.testVolts)) {
    return {
      cause: "unit",
      reason: `${model.maker} ${model.model} has no test voltage of ${formatTestVolts(cell.testVolts)}`,
    };
  }
  if (highestVolts > bench.ratedVolts) {
    const most = formatTestVolts(highestVolts);
    return { cause: "bench", reason: `${bench.name} would stand ${most}, rated ${formatTestVolts(bench.ratedVolts)}` };
  }
  return null;
}

function pointFor(
  cell: MatrixCell,
  dials: number[],
  section: ResistanceSection,
  { bench, model, room }: PlanRequest,
): Omit<PlannedPoint, "index"> {
  const { standard } = bench;
  const acrossVolts = Math.min(cell.testVolts, model.shortCircuitAmperes * cell.nominalOhms);
  const standardOhms = correctedOhms(standard, dials, { celsius: room.celsius, acrossVolts });
  const timeConstantSeconds = standardOhms * bench.capacitanceFarads + model.filterSeconds;
  const { settling, readingsPerPoint: readings } = section;
  const stated = firstStatedLimit(model.accuracy, model.ranges, cell.testVolts, [standardOhms, cell.nominalOhms]);
  return {
    ...cell,
    standardId: standard.id,
    dials,
    standardOhms,
    standardUncertaintyOhms: expandedUncertaintyOhms(standard, dials),
    highestVolts: highestVoltsAt(model, cell),
    limitOhms: stated?.limitOhms ?? null,
    settling,
    readings,
    timeConstantSeconds,
    forecastSeconds: forecastPointSeconds({
      settling,
      timeConstantSeconds,
      readings,
      displayUpdateSeconds: model.displayUpdateSeconds,
    }),
  };
}
