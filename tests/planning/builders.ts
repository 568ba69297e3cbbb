import type { Bench } from "@/lib/schemas/bench";
import type { DecadeBoxRecord, UnitModel } from "@/lib/schemas/instrument";
import type { RecipeDocument, ResistanceSection } from "@/lib/schemas/recipe";
import { amperes, farads, ohms, volts } from "@/lib/units/quantities";
import { box, decade, range, row } from "../metrology/builders";

export const nineDecades: DecadeBoxRecord = box(
  [10e9, 1e9, 100e6, 10e6, 1e6, 100e3, 10e3, 1e3].map((step) => decade(step)),
);

export function bench(changes: Partial<Bench> = {}): Bench {
  return {
    id: "north",
    name: "North bench",
    room: "workshop",
    ratedVolts: volts(1500),
    capacitanceFarads: farads(150e-12),
    dischargedVolts: volts(30),
    roomLimits: { lowestCelsius: 18, highestCelsius: 28, highestHumidityPercent: 60 },
    devices: [],
    standard: nineDecades,
    simulation: null,
    ...changes,
  };
}

export function model(changes: Partial<UnitModel> = {}): UnitModel {
  return {
    id: "pellham-ir-10",
    maker: "Pellham",
    model: "IR-10",
    testVolts: [50, 100, 250, 500, 1000].map(volts),
    ranges: [range(4e9, 1e6), range(40e9, 10e6), range(200e9, 1e9)],
    accuracy: [row({ fromOhms: 10e3, toOhms: 100e9, percentOfReading: 3, digits: 2 })],
    statementEdition: "2025",
    openCircuitFactor: 1.25,
    shortCircuitAmperes: amperes(0.002),
    displayUpdateSeconds: 0.5,
    filterSeconds: 0.4,
    ...changes,
  };
}

export interface SectionChanges {
  nominalOhms?: number[];
  testVolts?: number[];
  excluded?: [nominalOhms: number, testVolts: number][];
  settling?: ResistanceSection["settling"];
  readingsPerPoint?: number;
  order?: ResistanceSection["order"];
}

export function section(changes: SectionChanges = {}): ResistanceSection {
  return {
    kind: "resistance",
    nominalOhms: (changes.nominalOhms ?? [1e6, 1e9]).map(ohms),
    testVolts: (changes.testVolts ?? [250, 500]).map(volts),
    excluded: (changes.excluded ?? []).map(([nominal, test]) => ({
      nominalOhms: ohms(nominal),
      testVolts: volts(test),
    })),
    settling: changes.settling ?? { kind: "fixed", waitSeconds: 3 },
    readingsPerPoint: changes.readingsPerPoint ?? 5,
    order: changes.order ?? "by-voltage",
  };
}

export function recipe(...sections: ResistanceSection[]): RecipeDocument {
  return { name: "Check", purpose: "", sections, decisionRule: { kind: "simple" } };
}
