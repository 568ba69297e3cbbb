import { isLeftOut } from "@/lib/planning/plan";
import type { MatrixCell, PointOrder, RecipeDocument, ResistanceSection } from "@/lib/schemas/recipe";
import type { SettlingPolicy } from "@/lib/schemas/settling";
import { formatTestVolts, THIN_SPACE } from "@/lib/units/format";
import { shortOhms } from "./recipe-words";

/** The settling fields of all three policies, as typed; only those of `kind` count. */
export interface SettlingForm {
  kind: SettlingPolicy["kind"];
  waitSeconds: string;
  baseSeconds: string;
  timeConstants: string;
  driftPercentPerMinute: string;
  spreadPercent: string;
  displayUpdates: string;
  leastSeconds: string;
  mostSeconds: string;
}

export type SettlingNumber = Exclude<keyof SettlingForm, "kind">;

/** A recipe as it stands in the form: text where a person types. */
export interface RecipeForm {
  name: string;
  purpose: string;
  resistances: string;
  voltages: string;
  excluded: readonly MatrixCell[];
  settling: SettlingForm;
  readings: string;
  order: PointOrder;
  modelIds: readonly string[];
}

/** Which numbers a policy needs, in the order of the form. */
export const settlingNumbers: Readonly<Record<SettlingPolicy["kind"], readonly SettlingNumber[]>> = {
  fixed: ["waitSeconds"],
  scaled: ["baseSeconds", "timeConstants"],
  steady: ["driftPercentPerMinute", "spreadPercent", "displayUpdates", "leastSeconds", "mostSeconds"],
};

/** Common practice for a tester that settles within a minute or two; a start, to be set for the unit at hand. */
const usualSettling: SettlingForm = {
  kind: "steady",
  waitSeconds: "10",
  baseSeconds: "4",
  timeConstants: "7",
  driftPercentPerMinute: "0.5",
  spreadPercent: "0.5",
  displayUpdates: "3",
  leastSeconds: "5",
  mostSeconds: "120",
};

export const emptyRecipeForm: RecipeForm = {
  name: "",
  purpose: "",
  resistances: "",
  voltages: "",
  excluded: [],
  settling: usualSettling,
  readings: "5",
  order: "by-voltage",
  modelIds: [],
};

/** A stored recipe as form text, to be edited. */
export function recipeFormOf(document: RecipeDocument, modelIds: readonly string[]): RecipeForm {
  const section = document.sections[0]!;
  return {
    name: document.name,
    purpose: document.purpose,
    resistances: typedOhms(section.nominalOhms),
    voltages: typed(section.testVolts.map(formatTestVolts)),
    excluded: section.excluded,
    settling: settlingFormOf(section.settling),
    readings: String(section.readingsPerPoint),
    order: section.order,
    modelIds,
  };
}

/** Resistances as a person would type them. */
export function typedOhms(values: readonly number[]): string {
  return typed(values.map(shortOhms));
}

/** As a person would type it: plain spaces, commas between. */
function typed(values: readonly string[]): string {
  return values.join(", ").replaceAll(THIN_SPACE, " ");
}

function settlingFormOf({ kind, ...numbers }: SettlingPolicy): SettlingForm {
  const texts = Object.entries(numbers).map(([name, value]) => [name, String(value)]);
  return { ...usualSettling, ...(Object.fromEntries(texts) as Partial<SettlingForm>), kind };
}

/** Leaves a cell out, or takes it back in. */
export function withCell(form: RecipeForm, cell: MatrixCell, isIncluded: boolean): RecipeForm {
  return withCells(form, [cell], isIncluded);
}

/** Leaves cells out, or takes them back in. */
export function withCells(form: RecipeForm, cells: readonly MatrixCell[], isIncluded: boolean): RecipeForm {
  const rest = form.excluded.filter((known) => !cells.some((cell) => isSameCell(known, cell)));
  return { ...form, excluded: isIncluded ? rest : [...rest, ...cells] };
}

export function isSameCell(a: MatrixCell, b: MatrixCell): boolean {
  return a.nominalOhms === b.nominalOhms && a.testVolts === b.testVolts;
}

/** Number of points that a section asks for. */
export function countPoints(section: ResistanceSection): number {
  const cells = section.nominalOhms.flatMap((nominalOhms) =>
    section.testVolts.map((testVolts) => ({ nominalOhms, testVolts })),
  );
  return cells.filter((cell) => !isLeftOut(section, cell)).length;
}
