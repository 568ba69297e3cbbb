import { z } from "zod";
import { ohmsSchema, voltsSchema } from "@/lib/units/quantities";
import { settlingPolicySchema } from "./settling";

/** How a verdict is reached from error, limit and expanded uncertainty U. */
export const decisionRuleSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("simple") }),
  /** Guard band w = ratio · U (ILAC-G8:09/2019, 4.2). */
  z.object({ kind: z.literal("guarded"), ratio: z.number().positive().max(3) }),
  /** Four verdicts with guard bands on both sides of the limit (ILAC-G8:09/2019, 4.2.3). */
  z.object({ kind: z.literal("four-way"), ratio: z.number().positive().max(3) }),
]);
export type DecisionRule = z.infer<typeof decisionRuleSchema>;

export const pointOrderSchema = z.enum(["by-voltage", "by-resistance"]);
export type PointOrder = z.infer<typeof pointOrderSchema>;

export const matrixCellSchema = z.object({ nominalOhms: ohmsSchema, testVolts: voltsSchema });
export type MatrixCell = z.infer<typeof matrixCellSchema>;

function isAscending(values: readonly number[]): boolean {
  return values.every((value, index) => index === 0 || value > values[index - 1]!);
}

/** Resistances times test voltages, less the excluded cells. */
export const resistanceSectionSchema = z.object({
  kind: z.literal("resistance"),
  nominalOhms: z
    .array(ohmsSchema.refine((value) => value > 0, "A resistance is more than 0 Ω."))
    .min(1, "Enter at least one resistance.")
    .max(200, "A section holds at most 200 resistances.")
    .refine(isAscending, "Each resistance stands once, in rising order."),
  testVolts: z
    .array(
      voltsSchema.refine((value) => value > 0 && value <= 15_000, "A test voltage lies above 0 V and up to 15 kV."),
    )
    .min(1, "Enter at least one test voltage.")
    .max(40, "A section holds at most 40 test voltages.")
    .refine(isAscending, "Each test voltage stands once, in rising order."),
  excluded: z.array(matrixCellSchema),
  settling: settlingPolicySchema,
  readingsPerPoint: z.int().min(1).max(1000),
  order: pointOrderSchema,
});
export type ResistanceSection = z.infer<typeof resistanceSectionSchema>;

export const recipeSectionSchema = z.discriminatedUnion("kind", [resistanceSectionSchema]);
export type RecipeSection = z.infer<typeof recipeSectionSchema>;

/** What an engineer writes once and technicians run a hundred times. */
export const recipeDocumentSchema = z.object({
  name: z.string().trim().min(1, "Give the recipe a name.").max(80),
  purpose: z.string().trim().max(400),
  sections: z.array(recipeSectionSchema).min(1, "A recipe has at least one section.").max(20),
  decisionRule: decisionRuleSchema,
});
export type RecipeDocument = z.infer<typeof recipeDocumentSchema>;

export const recipeStateSchema = z.enum(["draft", "released", "withdrawn"]);

/** One version of a recipe. A released version never changes. */
export const recipeVersionSchema = z.object({
  id: z.string(),
  recipeId: z.string(),
  version: z.int().positive(),
  state: recipeStateSchema,
  document: recipeDocumentSchema,
  modelIds: z.array(z.string()),
  changedBy: z.string(),
  changedAtMs: z.number(),
});
export type RecipeVersion = z.infer<typeof recipeVersionSchema>;
