export interface StartReadiness {
  hasUnit: boolean;
  hasRecipe: boolean;
  preflight: "none" | "checking" | "failed" | "ready";
  /** Titles of the checks that block. */
  blocked: readonly string[];
  /** One entry a caution, in the order of the page: whether it is ticked. */
  ticked: readonly boolean[];
}

const ORDINALS = ["first", "second", "third", "fourth", "fifth", "sixth", "seventh", "eighth", "ninth", "tenth"];

/** What keeps a run from being started, as the sentence beside the button; null when nothing does. */
export function missingToStart(readiness: StartReadiness): string | null {
  const { hasUnit, hasRecipe, preflight, blocked, ticked } = readiness;
  if (!hasUnit) return hasRecipe ? "Choose the unit to go on." : "Choose the unit and the recipe to go on.";
  if (!hasRecipe) return "Choose the recipe to go on.";
  if (preflight === "failed") return "The preflight was not made. Check again to go on.";
  if (blocked.length > 0) return `${blockedWords(blocked)} to go on.`;
  const open = ticked.flatMap((isTicked, index) => (isTicked ? [] : [index]));
  if (open.length > 0) return `${confirmWords(open, ticked.length)} to go on.`;
  return preflight === "ready" ? null : "Checking the bench.";
}

function blockedWords(blocked: readonly string[]): string {
  return blocked.length === 1 ? `Mend “${blocked[0]}”` : `Mend the ${blocked.length} blocked lines of the preflight`;
}

function confirmWords(open: readonly number[], count: number): string {
  if (open.length === count && count > 1) return `Confirm the ${count === 3 ? "three" : count} lines`;
  const lines = open.map((index) => ORDINALS[index] ?? `${index + 1}th`);
  if (lines.length === 1) return `Confirm the ${lines[0]} line`;
  return `Confirm the ${lines.slice(0, -1).join(", ")} and ${lines.at(-1)} lines`;
}
