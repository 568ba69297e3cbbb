import { saveRecipeSchema, type SaveRecipe } from "@/lib/schemas/run";

const untilSteady = {
  kind: "steady",
  driftPercentPerMinute: 0.5,
  spreadPercent: 0.5,
  displayUpdates: 3,
  leastSeconds: 5,
  mostSeconds: 120,
};
const thirteen = [100e3, 500e3, 1e6, 5e6, 10e6, 50e6, 100e6, 500e6, 1e9, 5e9, 10e9, 50e9, 90e9];
const fiveVoltages = [50, 100, 250, 500, 1000];

function recipe(
  name: string,
  purpose: string,
  modelIds: readonly string[],
  section: {
    nominalOhms: number[];
    testVolts: number[];
    excluded?: object[];
    settling?: object;
    readingsPerPoint?: number;
  },
): SaveRecipe {
  const rest = { kind: "resistance", excluded: [], settling: untilSteady, readingsPerPoint: 5, order: "by-voltage" };
  const document = { name, purpose, sections: [{ ...rest, ...section }], decisionRule: { kind: "simple" } };
  return saveRecipeSchema.parse({ document, modelIds, release: true });
}

/** The workshop's released recipes. */
export const demoRecipes: readonly SaveRecipe[] = [
  recipe(
    "Five-voltage accuracy",
    "The yearly check of testers with five test voltages, up to 90 GΩ.",
    ["pellham-ir-10"],
    {
      nominalOhms: thirteen,
      testVolts: fiveVoltages,
      excluded: [
        { nominalOhms: 50e9, testVolts: 50 },
        { nominalOhms: 90e9, testVolts: 50 },
      ],
    },
  ),
  recipe("Full matrix", "Every resistance at every voltage, for a unit that is to be adjusted.", ["pellham-ir-10"], {
    nominalOhms: thirteen,
    testVolts: fiveVoltages,
  }),
  recipe(
    "Three-voltage check",
    "The yearly check of testers from 250 V up, to 10 GΩ.",
    ["aldgrove-m5", "pellham-ir-10"],
    {
      nominalOhms: [100e3, 1e6, 10e6, 100e6, 500e6, 1e9, 5e9, 10e9],
      testVolts: [250, 500, 1000],
    },
  ),
  recipe(
    "Quick check",
    "Nine points before a unit leaves for the field.",
    ["pellham-ir-10", "aldgrove-m5", "sorrel-k2"],
    {
      nominalOhms: [1e6, 100e6, 1e9],
      testVolts: [250, 500, 1000],
      settling: { kind: "fixed", waitSeconds: 3 },
      readingsPerPoint: 3,
    },
  ),
  recipe(
    "Low range, 250 V and 500 V",
    "The lower half of the small testers, with a wait that grows with the resistance.",
    ["sorrel-k2", "aldgrove-m5"],
    {
      nominalOhms: [100e3, 500e3, 1e6, 5e6, 10e6, 50e6],
      testVolts: [250, 500],
      settling: { kind: "scaled", baseSeconds: 4, timeConstants: 7 },
      readingsPerPoint: 3,
    },
  ),
];
