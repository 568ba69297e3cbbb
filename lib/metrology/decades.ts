import type { Decade, DecadeBoxRecord } from "@/lib/schemas/instrument";
import { ohms, type Ohms } from "@/lib/units/quantities";
import { MetrologyError, requireFinite, requireNonNegative } from "./metrology-error";

/** What the resistance of a standard depends on. */
export interface StandardConditions {
  celsius: number;
  /** Voltage across the whole standard. */
  acrossVolts: number;
}

/** One decade with the position that its dial stands at. */
export interface SetDecade {
  decade: Decade;
  position: number;
  /** position · stepOhms. */
  nominalOhms: number;
}

const PPM = 1e-6;

/**
 * The decades of a box with their positions, from the heaviest to the lightest.
 * Throws MetrologyError when there is not one whole position within its dial for each decade.
 */
export function setDecades(box: DecadeBoxRecord, positions: readonly number[]): SetDecade[] {
  if (positions.length !== box.decades.length) {
    throw new MetrologyError("positions", `must hold ${box.decades.length} positions, got ${positions.length}`);
  }
  return box.decades.map((decade, index) => {
    const position = requirePosition(decade, positions[index]!, index);
    return { decade, position, nominalOhms: withoutArtefact(position * decade.stepOhms) };
  });
}

/**
 * Nominal value of a setting: the sum of position times step, without the residual resistance.
 * Shape: one position for each decade -> ohms. Throws MetrologyError as `setDecades`.
 */
export function nominalOhmsOf(box: DecadeBoxRecord, positions: readonly number[]): Ohms {
  return ohms(withoutArtefact(sumOf(setDecades(box, positions).map(({ nominalOhms }) => nominalOhms))));
}

/**
 * The value that a setting really has under the present conditions: residual resistance, and for each decade
 * (position · step + correction) · (1 + α·(t - t_ref)) · (1 + β·V_i).
 *
 * V_i is the decade's share of the voltage, V·R_i/R; the voltage coefficient counts from zero volts.
 * Shape: one position for each decade, degrees Celsius, volts -> ohms.
 * Throws MetrologyError for a position that the box lacks, a missing correction, or conditions that are not finite.
 */
export function correctedOhms(
  box: DecadeBoxRecord,
  positions: readonly number[],
  { celsius, acrossVolts }: StandardConditions,
): Ohms {
  const kelvin = requireFinite("celsius", celsius) - box.referenceCelsius;
  requireNonNegative("acrossVolts", acrossVolts);
  const decades = setDecades(box, positions);
  const total = sumOf(decades.map(({ nominalOhms }) => nominalOhms));
  const values = decades.map(({ decade, position, nominalOhms }, index) => {
    const volts = total === 0 ? 0 : (acrossVolts * nominalOhms) / total;
    const temperatureFactor = 1 + decade.temperatureCoefficientPpmPerKelvin * PPM * kelvin;
    const voltageFactor = 1 + decade.voltageCoefficientPpmPerVolt * PPM * volts;
    return (nominalOhms + correctionAt(decade, position, index)) * temperatureFactor * voltageFactor;
  });
  return ohms(Math.max(0, box.residualOhms + sumOf(values)));
}

/**
 * Expanded uncertainty (k = 2) of a setting from the certificate's figures. The decades of one box were calibrated
 * against the same standards, so their uncertainties count as fully correlated and add linearly (JCGM 100:2008, 5.2.2, note 1).
 *
 * Shape: one position for each decade -> ohms. Throws MetrologyError as `setDecades`.
 */
export function expandedUncertaintyOhms(box: DecadeBoxRecord, positions: readonly number[]): number {
  const parts = setDecades(box, positions).map(({ decade, nominalOhms }) => nominalOhms * decade.uncertaintyPercent);
  return sumOf(parts) / 100;
}

function correctionAt(decade: Decade, position: number, index: number): number {
  const correction = decade.correctionsOhms[position];
  const field = `decades[${index}].correctionsOhms[${position}]`;
  if (correction === undefined) throw new MetrologyError(field, "is missing");
  return requireFinite(field, correction);
}

function requirePosition(decade: Decade, position: number, index: number): number {
  if (!Number.isInteger(position) || position < 0 || position > decade.highestPosition) {
    throw new MetrologyError(`positions[${index}]`, `must be a whole number from 0 to ${decade.highestPosition}`);
  }
  return position;
}

/** 3 · 0.1 is 0.3: fifteen digits are more than any dial has. */
function withoutArtefact(value: number): number {
  return Number(value.toPrecision(15));
}

function sumOf(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0);
}
