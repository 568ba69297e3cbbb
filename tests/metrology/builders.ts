import type { AccuracyRow, Decade, DecadeBoxRecord, DisplayRange } from "@/lib/schemas/instrument";
import { amperes, ohms, volts } from "@/lib/units/quantities";

/** A decade without deviation that stands almost anything, unless told otherwise. */
export function decade(stepOhms: number, changes: Partial<Decade> = {}): Decade {
  const highestPosition = changes.highestPosition ?? 9;
  return {
    stepOhms: ohms(stepOhms),
    highestPosition,
    correctionsOhms: Array.from({ length: highestPosition + 1 }, () => 0),
    uncertaintyPercent: 0.1,
    temperatureCoefficientPpmPerKelvin: 0,
    voltageCoefficientPpmPerVolt: 0,
    ratedVolts: volts(5000),
    ratedAmperes: amperes(1),
    ratedWatts: 1000,
    ...changes,
  };
}

export function box(decades: readonly Decade[], changes: Partial<DecadeBoxRecord> = {}): DecadeBoxRecord {
  return {
    id: "box-1",
    kind: "decade-box",
    maker: "Corvane",
    model: "DB-9",
    name: "Corvane DB-9",
    serialNumber: "C9-0007",
    ratedVolts: volts(5000),
    residualOhms: ohms(0),
    referenceCelsius: 23,
    decades: [...decades],
    calibration: { certificate: "T-1", calibratedOn: "2026-01-10", dueOn: "2027-01-10" },
    ...changes,
  };
}

export function range(toOhms: number, resolutionOhms: number): DisplayRange {
  return { toOhms: ohms(toOhms), resolutionOhms: ohms(resolutionOhms) };
}

/** A row for all voltages from 0 to 100 GΩ, unless told otherwise. */
export function row(changes: {
  testVolts?: number[];
  fromOhms?: number;
  toOhms?: number;
  percentOfReading?: number;
  digits?: number;
  percentPerGigaohm?: number;
}): AccuracyRow {
  return {
    testVolts: (changes.testVolts ?? []).map(volts),
    fromOhms: ohms(changes.fromOhms ?? 0),
    toOhms: ohms(changes.toOhms ?? 100e9),
    percentOfReading: changes.percentOfReading ?? 0,
    digits: changes.digits ?? 0,
    percentPerGigaohm: changes.percentPerGigaohm ?? 0,
  };
}

/** What a call throws, for errors that name their field. */
export function errorFrom(act: () => unknown): { name: string; field: string; message: string } {
  try {
    act();
  } catch (error) {
    return error as { name: string; field: string; message: string };
  }
  throw new Error("nothing was thrown");
}
