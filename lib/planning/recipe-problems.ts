import { findSetting } from "@/lib/metrology/find-setting";
import type { Standard, UnitModel } from "@/lib/schemas/instrument";
import type { RecipeDocument, ResistanceSection } from "@/lib/schemas/recipe";
import { formatOhms, formatTestVolts } from "@/lib/units/format";
import { isLeftOut, orderedCells } from "./plan";

/** What is wrong with one field of a document; `path` leads to the field. */
export interface RecipeProblem {
  path: (string | number)[];
  message: string;
}

/** What the laboratory has, against which a recipe is checked. */
export interface RecipeSurroundings {
  /** Models that the recipe is for; with none the test voltages are not checked. */
  models: readonly UnitModel[];
  standards: readonly Standard[];
}

/**
 * What would keep a well-formed recipe from being run: no point left, a resistance that no standard makes, a test
 * voltage that none of its models has, a decision rule that cannot be applied. Empty when nothing does.
 *
 * The same problems are found by the form and by the handler that stores.
 */
export function findRecipeProblems(document: RecipeDocument, surroundings: RecipeSurroundings): RecipeProblem[] {
  const inSections = document.sections.flatMap((section, index) =>
    sectionProblems(section, surroundings).map(({ path, message }) => ({
      path: ["sections", index, ...path],
      message,
    })),
  );
  return [...inSections, ...ruleProblems(document)];
}

function sectionProblems(section: ResistanceSection, { models, standards }: RecipeSurroundings): RecipeProblem[] {
  return [
    ...resistanceProblems(section, standards),
    ...voltageProblems(section, models),
    ...(orderedCells(section).every((cell) => isLeftOut(section, cell))
      ? [{ path: ["excluded"], message: "Every point is left out. Keep at least one." }]
      : []),
  ];
}

function resistanceProblems(section: ResistanceSection, standards: readonly Standard[]): RecipeProblem[] {
  if (standards.length === 0) {
    return [{ path: ["nominalOhms"], message: "There is no resistance standard in the register yet." }];
  }
  return section.nominalOhms.flatMap((nominalOhms, index) => {
    const settings = standards.map((standard) => findSetting(standard, nominalOhms, 0));
    if (settings.some((setting) => setting.ok)) return [];
    const reasons = settings.flatMap((setting) => (setting.ok ? [] : [setting.reason]));
    return [
      { path: ["nominalOhms", index], message: `No standard makes ${formatOhms(nominalOhms)}: ${reasons.join("; ")}.` },
    ];
  });
}

function voltageProblems(section: ResistanceSection, models: readonly UnitModel[]): RecipeProblem[] {
  if (models.length === 0) return [];
  return section.testVolts.flatMap((testVolts, index) => {
    if (models.some((model) => model.testVolts.includes(testVolts))) return [];
    const known = models.map(({ maker, model, testVolts: has }) => `${maker} ${model} has ${listVolts(has)}`);
    return [
      { path: ["testVolts", index], message: `${formatTestVolts(testVolts)} is not to be had: ${known.join("; ")}.` },
    ];
  });
}

/** Guarded rules need a budget of uncertainty for each point, which judgements do not carry yet. */
function ruleProblems({ decisionRule }: RecipeDocument): RecipeProblem[] {
  if (decisionRule.kind === "simple") return [];
  const message = "A guard band needs an uncertainty budget, which points do not have yet. Choose simple acceptance.";
  return [{ path: ["decisionRule"], message }];
}

function listVolts(values: readonly number[]): string {
  const texts = values.map(formatTestVolts);
  return texts.length < 2 ? texts.join("") : `${texts.slice(0, -1).join(", ")} and ${texts.at(-1)}`;
}
