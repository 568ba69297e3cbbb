import type { DecisionRule } from "@/lib/schemas/recipe";
import type { Verdict } from "@/lib/schemas/run-event";
import { MetrologyError, requireFinite, requireNonNegative } from "./metrology-error";

/** Verdicts that a rule can give; the others speak of the measurement. */
export type RuleVerdict = Extract<Verdict, "inside" | "doubtful" | "outside">;

export interface RuleInput {
  rule: DecisionRule;
  errorOhms: number;
  /** Half-width of the tolerance interval. */
  limitOhms: number;
  /** Expanded uncertainty U; may be null for simple acceptance only. */
  expandedOhms: number | null;
}

/** Acceptance reaches to `acceptOhms`, doubt from there to `rejectOhms`. Both are half-widths. */
export interface AcceptanceLimits {
  acceptOhms: number;
  rejectOhms: number;
}

/** Equal to a limit counts as within it, also after the rounding of a subtraction. */
const ROUNDING = 1 + 1e-12;

/**
 * Limits of acceptance and of rejection for a tolerance of ± `limitOhms`.
 *
 * simple: both at the tolerance limit (w = 0). guarded: acceptance ends w = ratio·U inside the limit, rejection begins
 * at the limit. four-way: rejection begins w beyond the limit. An acceptance limit below zero means that nothing can be accepted.
 * Shape: ohms -> ohms.
 * Throws MetrologyError for a limit or uncertainty that is negative or not finite, and for a guarded rule without uncertainty.
 * Source: ILAC-G8:09/2019, 4.2.
 */
export function acceptanceLimits({ rule, limitOhms, expandedOhms }: Omit<RuleInput, "errorOhms">): AcceptanceLimits {
  requireNonNegative("limitOhms", limitOhms);
  if (rule.kind === "simple") return { acceptOhms: limitOhms, rejectOhms: limitOhms };
  if (expandedOhms === null) throw new MetrologyError("expandedOhms", `is needed for the ${rule.kind} rule`);
  const guardOhms = rule.ratio * requireNonNegative("expandedOhms", expandedOhms);
  return { acceptOhms: limitOhms - guardOhms, rejectOhms: rule.kind === "guarded" ? limitOhms : limitOhms + guardOhms };
}

/**
 * Verdict of a decision rule: inside up to the acceptance limit, outside beyond the rejection limit, doubtful between.
 * Simple acceptance is never doubtful.
 *
 * Shape, errors and source as `acceptanceLimits`; the error must be finite.
 */
export function applyDecisionRule(input: RuleInput): RuleVerdict {
  const error = Math.abs(requireFinite("errorOhms", input.errorOhms));
  const { acceptOhms, rejectOhms } = acceptanceLimits(input);
  if (acceptOhms >= 0 && error <= acceptOhms * ROUNDING) return "inside";
  return error <= rejectOhms * ROUNDING ? "doubtful" : "outside";
}
