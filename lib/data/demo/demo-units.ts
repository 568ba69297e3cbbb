import { unitModelSchema, unitSchema, type TesterPhysics, type Unit, type UnitModel } from "@/lib/schemas/instrument";

/** A display of 4000 counts up to 4 GΩ, coarser above: steps of 1 and 5 in the second digit at the top. */
const wideRanges = [
  { toOhms: 400e3, resolutionOhms: 100 },
  { toOhms: 4e6, resolutionOhms: 1e3 },
  { toOhms: 40e6, resolutionOhms: 10e3 },
  { toOhms: 400e6, resolutionOhms: 100e3 },
  { toOhms: 4e9, resolutionOhms: 1e6 },
  { toOhms: 10e9, resolutionOhms: 10e6 },
  { toOhms: 40e9, resolutionOhms: 100e6 },
  { toOhms: 100e9, resolutionOhms: 1e9 },
  { toOhms: 200e9, resolutionOhms: 5e9 },
];

function row(fromOhms: number, toOhms: number, percentOfReading: number, digits: number, percentPerGigaohm: number) {
  return { testVolts: [] as number[], fromOhms, toOhms, percentOfReading, digits, percentPerGigaohm };
}

/** The statement grows with resistance, and the more so the lower the test voltage: 3 % + 9 %/GΩ divided by the volts. */
const growingRows = [50, 100, 250, 500, 1000].map((testVolts) => ({
  ...row(1e9, 100e9, 3, 0, 9 / testVolts),
  testVolts: [testVolts],
}));

/** The models that the workshop serves, with their makers' statements. */
export const demoModels: readonly UnitModel[] = [
  {
    id: "pellham-ir-10",
    maker: "Pellham",
    model: "IR-10",
    testVolts: [50, 100, 250, 500, 1000],
    ranges: wideRanges,
    accuracy: [row(10e3, 1e9, 2, 2, 0), ...growingRows],
    statementEdition: "2025",
    openCircuitFactor: 1.2,
    shortCircuitAmperes: 0.002,
    displayUpdateSeconds: 0.5,
    filterSeconds: 0.4,
  },
  {
    id: "aldgrove-m5",
    maker: "Aldgrove",
    model: "M5",
    testVolts: [250, 500, 1000],
    ranges: wideRanges.slice(0, 7),
    accuracy: [row(10e3, 1e9, 3, 2, 0), row(1e9, 20e9, 5, 2, 0.2)],
    statementEdition: "2023",
    openCircuitFactor: 1.25,
    shortCircuitAmperes: 0.0015,
    displayUpdateSeconds: 0.8,
    filterSeconds: 0.7,
  },
  {
    id: "sorrel-k2",
    maker: "Sorrel",
    model: "K2",
    testVolts: [250, 500],
    ranges: wideRanges.slice(0, 5),
    accuracy: [row(50e3, 4e9, 5, 3, 0)],
    statementEdition: "2021",
    openCircuitFactor: 1.25,
    shortCircuitAmperes: 0.0015,
    displayUpdateSeconds: 1,
    filterSeconds: 0.5,
  },
].map((model) => unitModelSchema.parse(model));

const sound: TesterPhysics = {
  seed: 1,
  gainError: 0.001,
  leakageSiemens: 0,
  offsetAmperes: 2e-12,
  overshoot: 0.03,
  sourceOhms: 10e3,
  currentLimitAmperes: 0.0014,
  noise: 2e-4,
};

interface UnitData {
  assetNumber: string;
  modelId: string;
  serialNumber: string;
  /** How the tester differs from a sound one. */
  fault: Partial<TesterPhysics>;
}

const units: readonly UnitData[] = [
  { assetNumber: "TW-0355", modelId: "aldgrove-m5", serialNumber: "A5-30117", fault: {} },
  {
    assetNumber: "TW-0377",
    modelId: "aldgrove-m5",
    serialNumber: "A5-30290",
    fault: { leakageSiemens: 1 / 150e9, gainError: 0.004 },
  },
  { assetNumber: "TW-0398", modelId: "pellham-ir-10", serialNumber: "P10-4471", fault: { gainError: -0.002 } },
  { assetNumber: "TW-0409", modelId: "pellham-ir-10", serialNumber: "P10-4502", fault: { offsetAmperes: 0.32e-9 } },
  {
    assetNumber: "TW-0412",
    modelId: "pellham-ir-10",
    serialNumber: "P10-4519",
    fault: { offsetAmperes: 0.08e-9, gainError: 0.002 },
  },
  {
    assetNumber: "TW-0421",
    modelId: "pellham-ir-10",
    serialNumber: "P10-4533",
    fault: { gainError: 0.018, noise: 1.5e-3 },
  },
  { assetNumber: "TW-0433", modelId: "sorrel-k2", serialNumber: "K2-0081", fault: {} },
  { assetNumber: "TW-0440", modelId: "sorrel-k2", serialNumber: "K2-0096", fault: { leakageSiemens: 1 / 12e9 } },
];

/** The testers of the workshop: sound ones, leaky ones, one with an offset current, one noisy. */
export function demoUnits(): Unit[] {
  return units.map(({ assetNumber, modelId, serialNumber, fault }, index) =>
    unitSchema.parse({
      id: assetNumber.toLowerCase(),
      model: demoModels.find(({ id }) => id === modelId),
      serialNumber,
      assetNumber,
      simulation: { ...sound, ...fault, seed: 4100 + index },
    }),
  );
}
