import type { DecisionRule } from "@/lib/schemas/recipe";

/** A decision rule in a few words for a head, and as sentences for those who must know what a verdict means. */
export function ruleWords(rule: DecisionRule): { short: string; full: string } {
  switch (rule.kind) {
    case "simple":
      return {
        short: "simple acceptance",
        full: "Simple acceptance: inside when the error is no greater than the limit. Uncertainty is not taken into account, so a point close to its limit may be on either side.",
      };
    case "guarded":
      return {
        short: `guard band ${bandWords(rule.ratio)}`,
        full: `Guard band of ${bandWords(rule.ratio)}: inside when the error stays below the limit by at least that much, outside when it is greater than the limit; between the two the point is doubtful.`,
      };
    case "four-way":
      return {
        short: `guard bands ${bandWords(rule.ratio)} on both sides`,
        full: `Guard bands of ${bandWords(rule.ratio)} on both sides of the limit: a point within either band is doubtful.`,
      };
  }
}

function bandWords(ratio: number): string {
  return ratio === 1 ? "U" : `${ratio} U`;
}
