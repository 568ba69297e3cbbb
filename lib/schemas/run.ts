import { z } from "zod";
import { runConditionSchema, verdictSchema } from "./run-event";
import { recipeDocumentSchema } from "./recipe";

export const runStatusSchema = z.enum(["running", "held", "faulted", "interrupted", "stopped", "finished"]);
export type RunStatus = z.infer<typeof runStatusSchema>;

/** Statuses of a run that is over. */
export const endedStatuses: readonly RunStatus[] = ["stopped", "finished"];

export const verdictCountsSchema = z.object({
  inside: z.int(),
  doubtful: z.int(),
  outside: z.int(),
  unsettled: z.int(),
  notStated: z.int(),
  skipped: z.int(),
  open: z.int(),
  total: z.int(),
});
export type VerdictCounts = z.infer<typeof verdictCountsSchema>;

/** Groups of the stair line by test voltage; one entry per point: its verdict, `skipped`, `present` or `open`. */
export const stairStepSchema = z.union([verdictSchema, z.enum(["skipped", "present", "open"])]);
export type StairStep = z.infer<typeof stairStepSchema>;
export const stairGroupSchema = z.object({ testVolts: z.number(), steps: z.array(stairStepSchema) });
export type StairGroup = z.infer<typeof stairGroupSchema>;

/** A run in a list. Projected from the journal, never edited by hand. */
export const runSummarySchema = z.object({
  id: z.string(),
  number: z.int(),
  status: runStatusSchema,
  benchId: z.string(),
  benchName: z.string(),
  unitId: z.string(),
  unitName: z.string(),
  assetNumber: z.string(),
  recipeId: z.string(),
  recipeName: z.string(),
  recipeVersion: z.int(),
  condition: runConditionSchema,
  startedBy: z.string(),
  startedAtMs: z.number(),
  endedAtMs: z.number().nullable(),
  counts: verdictCountsSchema,
  stairs: z.array(stairGroupSchema),
});
export type RunSummary = z.infer<typeof runSummarySchema>;

/** What a technician sends to start a run. */
export const startRunSchema = z.object({
  /** Made by the client; the same id twice starts one run. */
  requestId: z.uuid(),
  benchId: z.string().min(1),
  unitId: z.string().min(1, "Choose the unit under test."),
  recipeVersionId: z.string().min(1, "Choose a recipe."),
  condition: runConditionSchema,
  cautions: z.array(z.string()),
  /** How fast a simulated bench's time runs; hardware always runs at 1. */
  clockSpeed: z.number().min(1).max(1000),
});
export type StartRun = z.infer<typeof startRunSchema>;

export const preflightRequestSchema = startRunSchema.pick({ benchId: true, unitId: true, recipeVersionId: true });
export type PreflightRequest = z.infer<typeof preflightRequestSchema>;

export const preflightCheckSchema = z.object({
  id: z.enum(["calibration", "ratings", "devices", "output", "dials", "room", "bench", "storage"]),
  title: z.string(),
  /** ready: nothing to do; look: may go on; blocked: must not start. */
  state: z.enum(["ready", "look", "blocked"]),
  finding: z.string(),
  cure: z.string().nullable(),
});
export type PreflightCheck = z.infer<typeof preflightCheckSchema>;

export const preflightSchema = z.object({
  checks: z.array(preflightCheckSchema),
  cautions: z.array(z.string()),
  points: z.int(),
  excluded: z.int(),
  forecastSeconds: z.number(),
  room: z.object({ celsius: z.number(), humidityPercent: z.number().nullable() }).nullable(),
  checkedAtMs: z.number(),
});
export type Preflight = z.infer<typeof preflightSchema>;

/** A command to a run. `id` is made by the client, so that a repeated send acts once. */
export const runCommandSchema = z.object({
  id: z.uuid(),
  kind: z.enum(["hold", "resume", "skip", "stop"]),
  reason: z.string().trim().max(400).nullable(),
});
export type RunCommand = z.infer<typeof runCommandSchema>;

export const runSortSchema = z.enum(["number", "unit", "recipe", "bench", "started", "outside"]);

/** Filter, order and page of the list of runs; lives in the URL. */
export const runQuerySchema = z.object({
  search: z.string().trim().max(80).default(""),
  status: z.enum(["all", "active", "finished", "stopped"]).default("all"),
  bench: z.string().default(""),
  outside: z.enum(["all", "some", "none"]).default("all"),
  sort: runSortSchema.default("number"),
  direction: z.enum(["rising", "falling"]).default("falling"),
  page: z.coerce.number().int().min(1).default(1),
  pageSize: z.coerce.number().int().min(5).max(100).default(20),
});
export type RunQuery = z.infer<typeof runQuerySchema>;

export const saveRecipeSchema = z.object({
  document: recipeDocumentSchema,
  modelIds: z.array(z.string()),
  release: z.boolean(),
});
export type SaveRecipe = z.infer<typeof saveRecipeSchema>;
