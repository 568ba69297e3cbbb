import type { UnitModel } from "@/lib/schemas/instrument";
import type { DecisionRule, PointOrder, RecipeVersion } from "@/lib/schemas/recipe";
import type { SettlingPolicy } from "@/lib/schemas/settling";
import { engineeringParts, formatDuration, formatTestVolts, THIN_SPACE } from "@/lib/units/format";

/** A nominal resistance as short as it can be told: `100 kΩ`, `1.5 GΩ`. */
export function shortOhms(ohms: number): string {
  const { number, unit } = engineeringParts(ohms, "Ω", { digits: 12 });
  return `${number.includes(".") ? number.replace(/\.?0+$/u, "") : number}${THIN_SPACE}${unit}`;
}

/** What a list was understood to be: `13 values, 100 kΩ to 90 GΩ`, `1 value, 10 MΩ`. */
export function understoodOhms(values: readonly number[]): string {
  return understood(values, shortOhms);
}

/** What a list was understood to be: `5 values, 50 V to 1000 V`. */
export function understoodVolts(values: readonly number[]): string {
  return understood(values, formatTestVolts);
}

function understood(values: readonly number[], format: (value: number) => string): string {
  if (values.length === 0) return "nothing yet";
  const count = values.length === 1 ? "1 value" : `${values.length} values`;
  const [least, most] = [Math.min(...values), Math.max(...values)];
  return least === most ? `${count}, ${format(least)}` : `${count}, ${format(least)} to ${format(most)}`;
}

/** How a recipe waits, in words. */
export function settlingWords(policy: SettlingPolicy): { name: string; detail: string } {
  switch (policy.kind) {
    case "fixed":
      return { name: "Fixed wait", detail: `${formatDuration(policy.waitSeconds)} at every point` };
    case "scaled":
      return {
        name: "Scaled with R × C",
        detail: `${formatDuration(policy.baseSeconds)} and ${policy.timeConstants} time constants of the point`,
      };
    case "steady":
      return {
        name: "Until steady",
        detail:
          `drift under ${policy.driftPercentPerMinute}${THIN_SPACE}% a minute and spread under ` +
          `${policy.spreadPercent}${THIN_SPACE}% over ${policy.displayUpdates} display steps, ` +
          `at least ${formatDuration(policy.leastSeconds)}, at most ${formatDuration(policy.mostSeconds)}`,
      };
  }
}

export const orderWords: Readonly<Record<PointOrder, string>> = {
  "by-voltage": "by voltage",
  "by-resistance": "by resistance",
};

export function ruleWords(rule: DecisionRule): string {
  switch (rule.kind) {
    case "simple":
      return "simple acceptance: inside when the error is within the limit";
    case "guarded":
      return `guard band of ${rule.ratio} × U`;
    case "four-way":
      return `four verdicts, guard band of ${rule.ratio} × U on both sides`;
  }
}

export const stateWords: Readonly<Record<RecipeVersion["state"], string>> = {
  draft: "Draft",
  released: "Released",
  withdrawn: "Withdrawn",
};

/** A list as a sentence holds it: `50 V, 100 V and 250 V`. */
export function listWords(words: readonly string[]): string {
  return words.length < 2 ? words.join("") : `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`;
}

/** Names of the models that a recipe is for: `Pellham IR-10, Aldgrove M5`. */
export function modelNames(modelIds: readonly string[], models: readonly UnitModel[]): string {
  const named = models.filter(({ id }) => modelIds.includes(id)).map(({ maker, model }) => `${maker} ${model}`);
  return named.length > 0 ? named.join(", ") : "all models";
}
