import { z } from "zod";
import { amperesSchema, ohmsSchema, voltsSchema } from "@/lib/units/quantities";

export const calibrationSchema = z.object({
  certificate: z.string(),
  calibratedOn: z.iso.date(),
  dueOn: z.iso.date(),
});
export type Calibration = z.infer<typeof calibrationSchema>;

/** One decade of a box: a dial whose position k adds about k times `stepOhms`. */
export const decadeSchema = z
  .object({
    stepOhms: ohmsSchema,
    highestPosition: z.int().min(1).max(10),
    /** Deviation from k · stepOhms at each position k, by certificate; index 0 belongs to position 0. */
    correctionsOhms: z.array(z.number()),
    /** Expanded uncertainty of the corrections at k = 2, in per cent of the value set on this dial. */
    uncertaintyPercent: z.number().positive(),
    temperatureCoefficientPpmPerKelvin: z.number(),
    voltageCoefficientPpmPerVolt: z.number(),
    ratedVolts: voltsSchema,
    ratedAmperes: amperesSchema,
    ratedWatts: z.number().positive(),
  })
  .refine((decade) => decade.correctionsOhms.length === decade.highestPosition + 1, {
    path: ["correctionsOhms"],
    message: "There is one correction for each position, position 0 included.",
  });
export type Decade = z.infer<typeof decadeSchema>;

/** A programmable decade box as the register describes it. Decades run from the heaviest to the lightest. */
export const decadeBoxSchema = z.object({
  id: z.string(),
  kind: z.literal("decade-box"),
  maker: z.string(),
  model: z.string(),
  name: z.string(),
  serialNumber: z.string(),
  ratedVolts: voltsSchema,
  residualOhms: ohmsSchema,
  referenceCelsius: z.number(),
  decades: z.array(decadeSchema).min(1),
  calibration: calibrationSchema,
});
export type DecadeBoxRecord = z.infer<typeof decadeBoxSchema>;

export const standardSchema = z.discriminatedUnion("kind", [decadeBoxSchema]);
export type Standard = z.infer<typeof standardSchema>;

/** One row of an accuracy statement, valid for readings from `fromOhms` to `toOhms`. */
export const accuracyRowSchema = z.object({
  /** Test voltages the row speaks of; empty means all. */
  testVolts: z.array(voltsSchema),
  fromOhms: ohmsSchema,
  toOhms: ohmsSchema,
  percentOfReading: z.number().nonnegative(),
  digits: z.number().nonnegative(),
  /** Per cent of the reading that is added for every gigaohm of it. */
  percentPerGigaohm: z.number().nonnegative(),
});
export type AccuracyRow = z.infer<typeof accuracyRowSchema>;

/** One range of a tester's display: readings up to `toOhms` move in steps of `resolutionOhms`. */
export const displayRangeSchema = z.object({ toOhms: ohmsSchema, resolutionOhms: ohmsSchema });
export type DisplayRange = z.infer<typeof displayRangeSchema>;

/** A model of tester with what its data sheet states. */
export const unitModelSchema = z.object({
  id: z.string(),
  maker: z.string(),
  model: z.string(),
  testVolts: z.array(voltsSchema).min(1),
  /** Ranges in rising order. */
  ranges: z.array(displayRangeSchema).min(1),
  accuracy: z.array(accuracyRowSchema).min(1),
  statementEdition: z.string(),
  /** Highest open-circuit voltage as a multiple of the test voltage. */
  openCircuitFactor: z.number().min(1).max(2),
  /** Highest current the tester can drive into a short circuit. */
  shortCircuitAmperes: amperesSchema,
  displayUpdateSeconds: z.number().positive(),
  /** Smoothing time constant of the tester's own filter. */
  filterSeconds: z.number().nonnegative(),
});
export type UnitModel = z.infer<typeof unitModelSchema>;

/** What a simulated tester really does; hardware has none of it. */
export const testerPhysicsSchema = z.object({
  seed: z.int(),
  /** Relative error of the indicated conductance. */
  gainError: z.number(),
  leakageSiemens: z.number().nonnegative(),
  offsetAmperes: z.number(),
  overshoot: z.number().nonnegative(),
  sourceOhms: z.number().positive(),
  currentLimitAmperes: z.number().positive(),
  /** Relative standard deviation of one display value. */
  noise: z.number().nonnegative(),
});
export type TesterPhysics = z.infer<typeof testerPhysicsSchema>;

/** A tester to be checked. */
export const unitSchema = z.object({
  id: z.string(),
  model: unitModelSchema,
  serialNumber: z.string(),
  assetNumber: z.string(),
  simulation: testerPhysicsSchema.nullable(),
});
export type Unit = z.infer<typeof unitSchema>;
