import { z } from "zod";
import { ohmsSchema, voltsSchema } from "@/lib/units/quantities";
import { benchSchema, roomSchema } from "./bench";
import { unitSchema } from "./instrument";
import { actorSchema } from "./person";
import { planSchema } from "./plan";
import { decisionRuleSchema, recipeDocumentSchema } from "./recipe";

export const runConditionSchema = z.enum(["as-found", "as-left"]);
export type RunCondition = z.infer<typeof runConditionSchema>;

/**
 * inside, doubtful (within the guard band), outside; unsettled and not-stated are judgements about the
 * measurement, never about the unit. Simple acceptance gives no doubtful verdict.
 */
export const verdictSchema = z.enum(["inside", "doubtful", "outside", "unsettled", "not-stated"]);
export type Verdict = z.infer<typeof verdictSchema>;

/** What a point came to. Derived from its readings, and derivable again under another rule. */
export const judgementSchema = z.object({
  verdict: verdictSchema,
  rule: decisionRuleSchema,
  standardOhms: ohmsSchema,
  /** Mean of the averaged readings; null when the display was over its range. */
  indicationOhms: ohmsSchema.nullable(),
  errorOhms: z.number().nullable(),
  errorPercent: z.number().nullable(),
  /** Limit at the indication; null where the accuracy statement says nothing. */
  limitOhms: z.number().nullable(),
  limitPercent: z.number().nullable(),
  /** Row of the accuracy statement that gave the limit. */
  statementRow: z.int().nullable(),
  resolutionOhms: z.number(),
  readings: z.int(),
  /** Standard deviation of the averaged readings; null with fewer than two. */
  deviationOhms: z.number().nullable(),
  /** Expanded uncertainty and its coverage factor; null until a budget is evaluated. */
  uncertainty: z.object({ expandedOhms: z.number(), coverageFactor: z.number() }).nullable(),
  settlingSeconds: z.number(),
});
export type Judgement = z.infer<typeof judgementSchema>;

export const readingPhaseSchema = z.enum(["settling", "averaging"]);
export type ReadingPhase = z.infer<typeof readingPhaseSchema>;

export const readingFlagSchema = z.enum(["over-range", "repeated"]);
export type ReadingFlag = z.infer<typeof readingFlagSchema>;

export const troubleCodeSchema = z.enum([
  "port-lost",
  "no-answer",
  "garbled-reply",
  "wrong-read-back",
  "not-discharged",
  "device-error",
  "refused",
  "wrong-identity",
  "storage",
  "internal",
]);
export type TroubleCode = z.infer<typeof troubleCodeSchema>;

/** Hardware or storage trouble in words: what happened, to what, and what to do. */
export const troubleSchema = z.object({ code: troubleCodeSchema, message: z.string(), cure: z.string() });
export type Trouble = z.infer<typeof troubleSchema>;

const pointAttempt = { point: z.int().nonnegative(), attempt: z.int().positive() };

/** Payload of each event, by type. Types are named noun.past-participle. */
export const runEventDataSchemas = {
  "run.started": z.object({
    runNumber: z.int().positive(),
    recipe: z.object({ recipeId: z.string(), version: z.int(), document: recipeDocumentSchema }),
    decisionRule: decisionRuleSchema,
    unit: unitSchema.omit({ simulation: true }),
    bench: benchSchema.omit({ simulation: true }),
    plan: planSchema,
    condition: runConditionSchema,
    room: roomSchema,
    cautions: z.array(z.string()),
    by: actorSchema,
    clockSpeed: z.number().positive(),
    appVersion: z.string(),
  }),
  "point.started": z.object(pointAttempt),
  "output.off-proven": z.object({ terminalVolts: z.number() }),
  "dials.set": z.object({ positions: z.array(z.int()), standardId: z.string(), nominalOhms: ohmsSchema }),
  "voltage.selected": z.object({ testVolts: voltsSchema }),
  /** Written before the output is switched on: from here on a voltage may be present. */
  "output.switching-on": z.object({ testVolts: voltsSchema }),
  "output.switched-on": z.object({ terminalVolts: z.number() }),
  "reading.taken": z.object({
    ...pointAttempt,
    phase: readingPhaseSchema,
    /** Null when the display is over its range. */
    ohms: ohmsSchema.nullable(),
    volts: z.number().nullable(),
    amperes: z.number().nullable(),
    flags: z.array(readingFlagSchema),
    /** The instrument's reply, letter for letter. */
    raw: z.string(),
  }),
  "point.settled": z.object({ ...pointAttempt, settlingSeconds: z.number() }),
  "point.unsettled": z.object({ ...pointAttempt, waitedSeconds: z.number() }),
  "point.judged": z.object({ ...pointAttempt, judgement: judgementSchema }),
  "point.skipped": z.object({ point: z.int(), by: actorSchema }),
  /** The attempt ended without a judgement; the point will be measured again. */
  "point.abandoned": z.object({ ...pointAttempt, reason: z.string() }),
  "output.unproven": z.object({ reason: z.string() }),
  /** Trouble that a harmless repetition cured. */
  "device.recovered": z.object({ device: z.string(), message: z.string(), tries: z.int() }),
  "run.held": z.object({ by: actorSchema, reason: z.string().nullable() }),
  "run.resumed": z.object({ by: actorSchema, room: roomSchema.nullable() }),
  "run.faulted": troubleSchema,
  "run.interrupted": z.object({ reason: z.string() }),
  "run.stopped": z.object({ by: actorSchema, reason: z.string().nullable() }),
  "run.finished": z.object({ judged: z.int(), skipped: z.int() }),
} as const;

export type RunEventType = keyof typeof runEventDataSchemas;
export type RunEventData<T extends RunEventType> = z.infer<(typeof runEventDataSchemas)[T]>;

/** Place and time of a journal record: number within the run, UTC milliseconds, milliseconds since the start (monotonic). */
export interface RecordStamp {
  seq: number;
  atMs: number;
  elapsedMs: number;
}

/** One record of a run's journal, a reading included. */
export type RunEvent = { [T in RunEventType]: RecordStamp & { type: T; data: RunEventData<T> } }[RunEventType];
export type RunEventOf<T extends RunEventType> = Extract<RunEvent, { type: T }>;

/** An event before the journal has numbered and timed it. */
export type NewRunEvent = { [T in RunEventType]: { type: T; data: RunEventData<T> } }[RunEventType];

export const runEventTypes = Object.keys(runEventDataSchemas) as RunEventType[];

const stampSchema = z.object({
  seq: z.int().positive(),
  atMs: z.number(),
  elapsedMs: z.number(),
  type: z.enum(runEventTypes as [RunEventType, ...RunEventType[]]),
  data: z.unknown(),
});

/** Checks one record from outside the process. Throws ZodError. */
export function parseRunEvent(value: unknown): RunEvent {
  const record = stampSchema.parse(value);
  return { ...record, data: runEventDataSchemas[record.type].parse(record.data) } as RunEvent;
}
