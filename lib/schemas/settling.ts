import { z } from "zod";

/** Waits the same time at every point. */
export const fixedWaitSchema = z.object({
  kind: z.literal("fixed"),
  waitSeconds: z.number().min(0).max(3600),
});

/** Waits `baseSeconds` plus a number of time constants R·C of the point. */
export const scaledWaitSchema = z.object({
  kind: z.literal("scaled"),
  baseSeconds: z.number().min(0).max(600),
  timeConstants: z.number().min(0).max(20),
});

/** Watches the display until drift and spread are within bounds over a window of several display steps. */
export const untilSteadySchema = z
  .object({
    kind: z.literal("steady"),
    driftPercentPerMinute: z.number().positive().max(100),
    spreadPercent: z.number().positive().max(100),
    /** Display updates that the watching window holds at least. */
    displayUpdates: z.int().min(3).max(50),
    leastSeconds: z.number().min(0).max(600),
    mostSeconds: z.number().positive().max(7200),
  })
  .refine((policy) => policy.mostSeconds > policy.leastSeconds, {
    path: ["mostSeconds"],
    message: "The greatest wait is longer than the least wait.",
  });

export const settlingPolicySchema = z.discriminatedUnion("kind", [
  fixedWaitSchema,
  scaledWaitSchema,
  untilSteadySchema,
]);
export type SettlingPolicy = z.infer<typeof settlingPolicySchema>;
export type UntilSteady = z.infer<typeof untilSteadySchema>;
