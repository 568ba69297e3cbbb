import { MetrologyError } from "@/lib/metrology/metrology-error";
import type { Bench, Room } from "@/lib/schemas/bench";
import type { Standard } from "@/lib/schemas/instrument";
import type { ExcludedPoint, Plan } from "@/lib/schemas/plan";
import type { PreflightCheck } from "@/lib/schemas/run";
import { formatOhms, formatTestVolts, THIN_SPACE } from "@/lib/units/format";

/** A certificate that ends within so many days is pointed out. */
const NOTICE_DAYS = 30;
const MS_PER_DAY = 86_400_000;
const MONTHS = ["Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"];

/**
 * Whether every standard is within its calibration on `today` (YYYY-MM-DD). Overdue blocks; due within 30 days is
 * pointed out; the due date itself still counts.
 * Throws MetrologyError for a date that does not exist.
 */
export function calibrationCheck(standards: readonly Standard[], today: string): PreflightCheck {
  const head = { id: "calibration", title: "Standards in calibration" } as const;
  const dues = standards.map(({ maker, model, calibration }) => ({
    name: `${maker} ${model}`,
    day: formatDay(calibration.dueOn),
    daysLeft: daysOf(calibration.dueOn) - daysOf(today),
  }));
  const overdue = dues.filter(({ daysLeft }) => daysLeft < 0);
  if (overdue.length > 0) {
    const finding = `overdue: ${overdue.map(({ name, day }) => `${name} since ${day}`).join(", ")}`;
    const cure = "Calibrate the standard, or choose a bench whose standards are in date.";
    return { ...head, state: "blocked", finding, cure };
  }
  const least = Math.min(...dues.map(({ daysLeft }) => daysLeft));
  const finding = dues.map(({ name, day }) => `${name} until ${day}`).join(", ") || "no standard to be calibrated";
  if (least > NOTICE_DAYS) return { ...head, state: "ready", finding, cure: null };
  return { ...head, state: "look", finding, cure: `A calibration ends ${inDays(least)}: plan the next one.` };
}

function inDays(days: number): string {
  return days === 0 ? "today" : `in ${days} ${days === 1 ? "day" : "days"}`;
}

/** Whether the ratings leave the recipe whole. Points left out by force are pointed out with a reason; no point left blocks. */
export function ratingsCheck({ points, excluded }: Plan): PreflightCheck {
  const head = { id: "ratings", title: "Ratings cover the recipe" } as const;
  const forced = excluded.filter(({ cause }) => cause !== "recipe");
  if (points.length === 0) {
    const finding =
      forced.length > 0 ? `no point can be run: ${describeExcluded(forced)}` : "the recipe leaves every point out";
    return { ...head, state: "blocked", finding, cure: "Choose another recipe or another bench." };
  }
  const count = `${points.length} ${points.length === 1 ? "point" : "points"}`;
  if (forced.length === 0) return { ...head, state: "ready", finding: `all ${count}`, cure: null };
  return {
    ...head,
    state: "look",
    finding: `${count}, ${forced.length} left out: ${describeExcluded(forced)}`,
    cure: "The run goes on without them.",
  };
}

/** Whether the room is within the bench's limits. Outside, or without a reading, the run must not start. */
export function roomCheck(room: Room | null, limits: Bench["roomLimits"]): PreflightCheck {
  const head = { id: "room", title: "Room" } as const;
  const { lowestCelsius, highestCelsius, highestHumidityPercent } = limits;
  if (!room) {
    return {
      ...head,
      state: "blocked",
      finding: "no reading of the room",
      cure: "Check the room sensor's power and cable.",
    };
  }
  const celsius = `${room.celsius.toFixed(1)}${THIN_SPACE}°C`;
  if (!(room.celsius >= lowestCelsius && room.celsius <= highestCelsius)) {
    const cure = `Wait until the room is between ${lowestCelsius} and ${highestCelsius}${THIN_SPACE}°C.`;
    return { ...head, state: "blocked", finding: `${celsius} is outside`, cure };
  }
  if (room.humidityPercent === null) {
    return {
      ...head,
      state: "look",
      finding: `${celsius} is inside, humidity unknown`,
      cure: "High resistances leak in moist air: look at a hygrometer.",
    };
  }
  const humidity = `${room.humidityPercent.toFixed(0)}${THIN_SPACE}%`;
  if (!(room.humidityPercent <= highestHumidityPercent)) {
    const cure = `Wait until the humidity is below ${highestHumidityPercent}${THIN_SPACE}%.`;
    return { ...head, state: "blocked", finding: `${celsius} is inside, humidity ${humidity} is too high`, cure };
  }
  return { ...head, state: "ready", finding: `${celsius}, ${humidity}`, cure: null };
}

/** What a person confirms before an output may be switched on; none for a plan without points. */
export function cautionsFor({ points }: Plan): string[] {
  if (points.length === 0) return [];
  const highest = formatTestVolts(Math.ceil(Math.max(...points.map(({ highestVolts }) => highestVolts))));
  return [
    "The guard cover is closed and nobody can touch the terminals.",
    `The leads are undamaged and rated for ${highest}, the most that this run may put out.`,
    "I know how to switch this bench off by hand.",
  ];
}

/** The first two exclusions with their reasons, and how many more there are. */
function describeExcluded(excluded: readonly ExcludedPoint[]): string {
  const shown = excluded
    .slice(0, 2)
    .map(
      ({ nominalOhms, testVolts, reason }) => `${formatOhms(nominalOhms)} at ${formatTestVolts(testVolts)}, ${reason}`,
    );
  const rest = excluded.length - shown.length;
  return [...shown, ...(rest > 0 ? [`and ${rest} more`] : [])].join("; ");
}

function daysOf(isoDate: string): number {
  const [year = NaN, month = NaN, day = NaN] = isoDate.split("-").map(Number);
  const date = new Date(Date.UTC(year, month - 1, day));
  if (Number.isNaN(date.getTime()) || date.toISOString().slice(0, 10) !== isoDate) {
    throw new MetrologyError("date", `must be a day written YYYY-MM-DD, got “${isoDate}”`);
  }
  return date.getTime() / MS_PER_DAY;
}

function formatDay(isoDate: string): string {
  const [year, month, day] = isoDate.split("-").map(Number);
  return `${day} ${MONTHS[month! - 1]} ${year}`;
}
