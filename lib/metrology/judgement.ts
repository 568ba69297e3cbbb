import type { AccuracyRow, DisplayRange } from "@/lib/schemas/instrument";
import type { PlannedPoint, StatedLimit } from "@/lib/schemas/plan";
import type { DecisionRule } from "@/lib/schemas/recipe";
import type { Judgement, Verdict } from "@/lib/schemas/run-event";
import { ohms, type Ohms } from "@/lib/units/quantities";
import { displayResolutionOhms, firstStatedLimit } from "./accuracy";
import { applyDecisionRule } from "./decision-rule";
import { MetrologyError, requireNonNegative, requirePositive } from "./metrology-error";
import { mean, sampleDeviation } from "./statistics";

export interface PointMeasurement {
  point: Pick<PlannedPoint, "nominalOhms" | "testVolts">;
  /** The unit's accuracy statement and display. */
  rows: readonly AccuracyRow[];
  ranges: readonly DisplayRange[];
  /** The averaged readings in ohms. */
  readings: readonly number[];
  /** Whether the display was over its range at any of the readings. */
  overRange: boolean;
  settled: boolean;
  settlingSeconds: number;
  rule: DecisionRule;
  /** The standard's corrected value. */
  standardOhms: number;
  /** Expanded uncertainty of the error, once a budget has been evaluated. */
  uncertainty?: Judgement["uncertainty"];
}

const SIMPLE: DecisionRule = { kind: "simple" };

/**
 * What a point came to: error against the standard's corrected value, limit at the indication, verdict.
 *
 * - An unsettled point is `unsettled`, whatever its error; error and limit are given all the same.
 * - Without a row that speaks of the point it is `not-stated`. The limit is taken at the indication; where that lies
 *   beyond the stated ends, at the standard's value or the point's nominal value.
 * - A display over its range is outside the limit wherever the statement covers the resistance that was connected.
 * - Guarded rules need `uncertainty`. Without it simple acceptance is applied, and the judgement names the rule applied.
 *
 * Shape: readings in ohms (at least one unless over range) -> Judgement, every number finite or null.
 * Throws MetrologyError for missing, negative or non-finite readings, a standard that is not above zero, or no ranges.
 */
export function judgePoint(measurement: PointMeasurement): Judgement {
  const standardOhms = ohms(requirePositive("standardOhms", measurement.standardOhms));
  const indicationOhms = indicationOf(measurement);
  const errorOhms = indicationOhms === null ? null : indicationOhms - standardOhms;
  const limit = limitFor(measurement, indicationOhms);
  const uncertainty = measurement.uncertainty ?? null;
  const rule = uncertainty ? measurement.rule : SIMPLE;
  return {
    verdict: verdictOf({ settled: measurement.settled, errorOhms, limit, rule, uncertainty }),
    rule,
    standardOhms,
    indicationOhms,
    errorOhms,
    errorPercent: errorOhms === null ? null : (100 * errorOhms) / standardOhms,
    limitOhms: limit?.limitOhms ?? null,
    limitPercent: limit ? (100 * limit.limitOhms) / standardOhms : null,
    statementRow: limit?.row ?? null,
    resolutionOhms: displayResolutionOhms(measurement.ranges, indicationOhms ?? standardOhms),
    readings: measurement.readings.length,
    deviationOhms: measurement.readings.length < 2 ? null : sampleDeviation(measurement.readings, "readings"),
    uncertainty,
    settlingSeconds: requireNonNegative("settlingSeconds", measurement.settlingSeconds),
  };
}

interface VerdictInput {
  settled: boolean;
  errorOhms: number | null;
  limit: StatedLimit | null;
  rule: DecisionRule;
  uncertainty: Judgement["uncertainty"];
}

function verdictOf({ settled, errorOhms, limit, rule, uncertainty }: VerdictInput): Verdict {
  if (!settled) return "unsettled";
  if (!limit) return "not-stated";
  if (errorOhms === null) return "outside";
  const expandedOhms = uncertainty?.expandedOhms ?? null;
  return applyDecisionRule({ rule, errorOhms, limitOhms: limit.limitOhms, expandedOhms });
}

/** Mean of the readings; null when any of them was over range, for the mean of the rest would lie low. */
function indicationOf({ readings, overRange }: PointMeasurement): Ohms | null {
  readings.forEach((reading, index) => requireNonNegative(`readings[${index}]`, reading));
  if (overRange) return null;
  if (readings.length === 0) throw new MetrologyError("readings", "must hold at least one reading");
  return ohms(mean(readings, "readings"));
}

function limitFor(measurement: PointMeasurement, indicationOhms: number | null): StatedLimit | null {
  const { rows, ranges, point, standardOhms } = measurement;
  const values = [standardOhms, point.nominalOhms];
  return firstStatedLimit(
    rows,
    ranges,
    point.testVolts,
    indicationOhms === null ? values : [indicationOhms, ...values],
  );
}
