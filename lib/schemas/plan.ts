import { z } from "zod";
import { ohmsSchema, voltsSchema } from "@/lib/units/quantities";
import { settlingPolicySchema } from "./settling";

/** The accuracy statement's limit at one value, and the row that gave it. */
export const statedLimitSchema = z.object({ limitOhms: z.number().nonnegative(), row: z.int().nonnegative() });
export type StatedLimit = z.infer<typeof statedLimitSchema>;

/** One test point, ready to be run. */
export const plannedPointSchema = z.object({
  index: z.int().nonnegative(),
  nominalOhms: ohmsSchema,
  testVolts: voltsSchema,
  standardId: z.string(),
  /** Dial positions from the heaviest decade to the lightest. */
  dials: z.array(z.int().nonnegative()),
  /** The standard's corrected value under the present conditions. */
  standardOhms: ohmsSchema,
  /** Expanded uncertainty of `standardOhms` at k = 2. */
  standardUncertaintyOhms: z.number().nonnegative(),
  /** Highest voltage that may stand across the standard at this point. */
  highestVolts: voltsSchema,
  /** Limit at the standard's value; null where the statement says nothing. */
  limitOhms: z.number().nullable(),
  settling: settlingPolicySchema,
  readings: z.int().positive(),
  /** Time constant R·C plus the tester's filter. */
  timeConstantSeconds: z.number().nonnegative(),
  forecastSeconds: z.number().nonnegative(),
});
export type PlannedPoint = z.infer<typeof plannedPointSchema>;

export const exclusionCauseSchema = z.enum(["recipe", "rating", "setting", "unit", "bench"]);

/** A cell of the recipe that is not run, and why. */
export const excludedPointSchema = z.object({
  nominalOhms: ohmsSchema,
  testVolts: voltsSchema,
  cause: exclusionCauseSchema,
  reason: z.string(),
});
export type ExcludedPoint = z.infer<typeof excludedPointSchema>;

export const planSchema = z.object({ points: z.array(plannedPointSchema), excluded: z.array(excludedPointSchema) });
export type Plan = z.infer<typeof planSchema>;
