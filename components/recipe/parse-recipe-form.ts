import { findRecipeProblems, type RecipeProblem, type RecipeSurroundings } from "@/lib/planning/recipe-problems";
import { recipeDocumentSchema, type RecipeDocument } from "@/lib/schemas/recipe";
import { parseOhms, parseVolts } from "@/lib/units/parse";
import type { Ohms, Volts } from "@/lib/units/quantities";
import { parseList, type ParsedList } from "./parse-list";
import { settlingNumbers, type RecipeForm, type SettlingForm, type SettlingNumber } from "./recipe-form";

/** Where a problem stands in the form. */
export type RecipeField =
  | "name"
  | "purpose"
  | "resistances"
  | "voltages"
  | "points"
  | "readings"
  | "order"
  | "models"
  | "form"
  | SettlingNumber;

export type FieldProblems = Partial<Record<RecipeField, string[]>>;

export interface ParsedRecipeForm {
  resistances: ParsedList<Ohms>;
  voltages: ParsedList<Volts>;
  /** Well formed, though the laboratory may not be able to run it; null while a field is not. */
  document: RecipeDocument | null;
  problems: FieldProblems;
}

/** Reads the whole form and finds what is wrong with each field. Nothing is stored while `problems` has an entry. */
export function parseRecipeForm(form: RecipeForm, surroundings: RecipeSurroundings): ParsedRecipeForm {
  const resistances = parseList(form.resistances, parseOhms);
  const voltages = parseList(form.voltages, parseVolts);
  const problems: FieldProblems = {};
  for (const message of resistances.problems) addProblem(problems, "resistances", message);
  for (const message of voltages.problems) addProblem(problems, "voltages", message);
  const shaped = recipeDocumentSchema.safeParse(candidateOf(form, resistances.values, voltages.values));
  if (!shaped.success) {
    addProblems(problems, shaped.error.issues as RecipeProblem[]);
    return { resistances, voltages, document: null, problems };
  }
  addProblems(problems, findRecipeProblems(shaped.data, surroundings));
  return { resistances, voltages, document: shaped.data, problems };
}

function candidateOf(form: RecipeForm, nominalOhms: Ohms[], testVolts: Volts[]): unknown {
  const excluded = form.excluded.filter(
    (cell) => nominalOhms.includes(cell.nominalOhms) && testVolts.includes(cell.testVolts),
  );
  const section = {
    kind: "resistance",
    nominalOhms,
    testVolts,
    excluded,
    settling: settlingOf(form.settling),
    readingsPerPoint: numberOf(form.readings),
    order: form.order,
  };
  return { name: form.name, purpose: form.purpose, sections: [section], decisionRule: { kind: "simple" } };
}

function settlingOf(settling: SettlingForm): unknown {
  const numbers = settlingNumbers[settling.kind].map((name) => [name, numberOf(settling[name])]);
  return { kind: settling.kind, ...Object.fromEntries(numbers) };
}

/** The number that was typed, a decimal comma included; undefined when it is none. */
function numberOf(text: string): number | undefined {
  const plain = text.trim().replace(",", ".");
  return /^-?(?:\d+\.?\d*|\.\d+)$/u.test(plain) ? Number(plain) : undefined;
}

/** Sorts problems that carry the path of a stored recipe, as the server sends them, to the fields of the form. */
export function fieldProblems(problems: readonly RecipeProblem[]): FieldProblems {
  const sorted: FieldProblems = {};
  addProblems(sorted, problems);
  return sorted;
}

function addProblems(sorted: FieldProblems, problems: readonly RecipeProblem[]): void {
  for (const { path, message } of problems) addProblem(sorted, fieldOf(path), readable(message));
}

function addProblem(sorted: FieldProblems, field: RecipeField, message: string): void {
  const known = sorted[field] ?? [];
  if (!known.includes(message)) sorted[field] = [...known, message];
}

const fieldByName: Readonly<Record<string, RecipeField>> = {
  name: "name",
  purpose: "purpose",
  nominalOhms: "resistances",
  testVolts: "voltages",
  excluded: "points",
  readingsPerPoint: "readings",
  order: "order",
  modelIds: "models",
  ...Object.fromEntries(Object.values(settlingNumbers).flatMap((names) => names.map((name) => [name, name]))),
};

function fieldOf(path: readonly (string | number)[]): RecipeField {
  const names = path.filter((part) => typeof part === "string").toReversed();
  return names.map((name) => fieldByName[name]).find((field) => field !== undefined) ?? "form";
}

const NUMBER_BOUND = /^Too (?:small|big): expected number to be (>=|>|<=|<)(\S+)$/u;
const boundWords: Readonly<Record<string, string>> = {
  ">": "more than",
  ">=": "at least",
  "<": "less than",
  "<=": "at most",
};

/** Bounds that carry no words of their own in the schema, said for people. */
function readable(message: string): string {
  const bound = NUMBER_BOUND.exec(message);
  if (bound) return `Enter ${boundWords[bound[1]!]} ${bound[2]}.`;
  if (message.startsWith("Invalid input: expected int")) return "Enter a whole number.";
  if (message.startsWith("Invalid input")) return "Enter a number.";
  const length = /^Too big: expected string to have <=(\d+) characters$/u.exec(message);
  return length ? `Use at most ${length[1]} characters.` : message;
}
