import { describe, expect, it } from "vitest";
import { findRecipeProblems } from "@/lib/planning/recipe-problems";
import { volts } from "@/lib/units/quantities";
import { box, decade } from "../metrology/builders";
import { model, nineDecades, recipe, section } from "./builders";

const laboratory = { models: [model()], standards: [nineDecades] };

function plain(problems: ReturnType<typeof findRecipeProblems>) {
  return problems.map(({ path, message }) => ({ path, message: message.replaceAll("\u2009", " ") }));
}

describe("findRecipeProblems", () => {
  it("finds none in a recipe that can be run", () => {
    expect(findRecipeProblems(recipe(section(), section({ nominalOhms: [90e9] })), laboratory)).toEqual([]);
  });

  it("finds that every point of a section is left out, at that section", () => {
    const bare = section({ nominalOhms: [1e6], testVolts: [250], excluded: [[1e6, 250]] });
    expect(plain(findRecipeProblems(recipe(section(), bare), laboratory))).toEqual([
      { path: ["sections", 1, "excluded"], message: "Every point is left out. Keep at least one." },
    ]);
  });

  it("finds a resistance that no standard makes, at its place in the list", () => {
    const problems = plain(findRecipeProblems(recipe(section({ nominalOhms: [1e6, 500e9] })), laboratory));
    expect(problems).toEqual([
      {
        path: ["sections", 0, "nominalOhms", 1],
        message: "No standard makes 500.0 GΩ: DB-9 makes 1.000 kΩ to 100.0 GΩ and no setting within 1 % of 500.0 GΩ.",
      },
    ]);
  });

  it("is content when one of several standards makes a resistance", () => {
    const standards = [nineDecades, box([decade(100e9)], { model: "TB-1" })];
    expect(findRecipeProblems(recipe(section({ nominalOhms: [500e9] })), { ...laboratory, standards })).toEqual([]);
  });

  it("says when there is no standard at all", () => {
    expect(findRecipeProblems(recipe(section()), { ...laboratory, standards: [] })).toEqual([
      { path: ["sections", 0, "nominalOhms"], message: "There is no resistance standard in the register yet." },
    ]);
  });

  it("finds a voltage that none of the models has, and says which they have", () => {
    const models = [model({ testVolts: [50, 100].map(volts) }), model({ model: "IR-1", testVolts: [volts(500)] })];
    const problems = plain(
      findRecipeProblems(recipe(section({ testVolts: [100, 250, 500] })), { ...laboratory, models }),
    );
    expect(problems).toEqual([
      {
        path: ["sections", 0, "testVolts", 1],
        message: "250 V is not to be had: Pellham IR-10 has 50 V and 100 V; Pellham IR-1 has 500 V.",
      },
    ]);
  });

  it("does not check voltages of a recipe for no model in particular", () => {
    expect(findRecipeProblems(recipe(section({ testVolts: [123] })), { ...laboratory, models: [] })).toEqual([]);
  });

  it("refuses a decision rule that cannot be applied without an uncertainty", () => {
    const document = { ...recipe(section()), decisionRule: { kind: "guarded", ratio: 1 } as const };
    expect(findRecipeProblems(document, laboratory).map(({ path }) => path)).toEqual([["decisionRule"]]);
  });
});
