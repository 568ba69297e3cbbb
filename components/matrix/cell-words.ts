import type { PointPhase } from "@/lib/journal/run-state";
import type { PlannedPoint } from "@/lib/schemas/plan";
import type { Judgement } from "@/lib/schemas/run-event";
import { formatDuration, formatErrorPercent, formatOhms, formatTestVolts } from "@/lib/units/format";
import { VERDICT_WORDS } from "@/components/marks/verdict";

export const PHASE_WORDS: Readonly<Record<PointPhase, string>> = {
  discharging: "discharging",
  setting: "setting",
  energising: "switching on",
  settling: "settling",
  averaging: "averaging",
  "de-energising": "switching off",
};

/** Error in per cent as a cell shows it; the words stand for a display over its range. */
export function errorWords({ errorPercent }: Judgement): string {
  return errorPercent === null ? "over range" : formatErrorPercent(errorPercent);
}

export function placeWords({ nominalOhms, testVolts }: { nominalOhms: number; testVolts: number }): string {
  return `${formatOhms(nominalOhms)} at ${formatTestVolts(testVolts)}`;
}

/** Everything about a judged point in one line. */
export function judgedWords(point: PlannedPoint, judgement: Judgement): string {
  const { indicationOhms, resolutionOhms, limitPercent, settlingSeconds, errorPercent } = judgement;
  return [
    `${placeWords(point)}: ${VERDICT_WORDS[judgement.verdict]}`,
    errorPercent !== null && `error ${formatErrorPercent(errorPercent)} %`,
    limitPercent !== null && `limit ±${limitPercent.toFixed(2)} %`,
    indicationOhms === null ? "over range" : `indication ${formatOhms(indicationOhms, resolutionOhms)}`,
    `standard ${formatOhms(judgement.standardOhms)}`,
    `settled after ${formatDuration(settlingSeconds)}`,
  ]
    .filter(Boolean)
    .join(", ");
}
