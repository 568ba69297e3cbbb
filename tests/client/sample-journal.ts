import { emptyRun } from "@/lib/journal/run-state";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import type { JournalColumns, ReadingColumns } from "@/lib/schemas/journal-columns";
import { parseRunEvent, type RunEvent, type RunEventOf } from "@/lib/schemas/run-event";

const person = { id: "person-1", name: "Ines Marlow" };
const calibration = { certificate: "K-2291", calibratedOn: "2026-02-01", dueOn: "2027-02-01" };
const settling = { kind: "fixed", waitSeconds: 2 };

const standard = {
  id: "box-1",
  kind: "decade-box",
  maker: "Corvane",
  model: "DB-2",
  name: "DB-2 no. 1",
  serialNumber: "0001",
  ratedVolts: 1000,
  residualOhms: 0,
  referenceCelsius: 23,
  decades: [
    {
      stepOhms: 1e6,
      highestPosition: 10,
      correctionsOhms: Array.from({ length: 11 }, () => 0),
      uncertaintyPercent: 0.1,
      temperatureCoefficientPpmPerKelvin: 0,
      voltageCoefficientPpmPerVolt: 0,
      ratedVolts: 1000,
      ratedAmperes: 0.01,
      ratedWatts: 1,
    },
  ],
  calibration,
};

const unit = {
  id: "unit-1",
  model: {
    id: "model-1",
    maker: "Pellham",
    model: "IR-10",
    testVolts: [100, 250],
    ranges: [{ toOhms: 1e10, resolutionOhms: 1000 }],
    accuracy: [{ testVolts: [], fromOhms: 0, toOhms: 1e10, percentOfReading: 2, digits: 2, percentPerGigaohm: 0 }],
    statementEdition: "2025",
    openCircuitFactor: 1.2,
    shortCircuitAmperes: 0.0015,
    displayUpdateSeconds: 0.5,
    filterSeconds: 0.3,
  },
  serialNumber: "77",
  assetNumber: "TW-0412",
};

const bench = {
  id: "north",
  name: "North bench",
  room: "Room 2",
  ratedVolts: 1000,
  capacitanceFarads: 3e-10,
  dischargedVolts: 30,
  roomLimits: { lowestCelsius: 18, highestCelsius: 28, highestHumidityPercent: 70 },
  devices: [],
  standard,
};

const cells = [100, 250].flatMap((testVolts) => [1e6, 5e6].map((nominalOhms) => ({ testVolts, nominalOhms })));

function startOf(): unknown {
  const document = {
    name: "Two-voltage check",
    purpose: "",
    decisionRule: { kind: "simple" },
    sections: [
      {
        kind: "resistance",
        nominalOhms: [1e6, 5e6],
        testVolts: [100, 250],
        excluded: [],
        settling,
        readingsPerPoint: 2,
        order: "by-voltage",
      },
    ],
  };
  const points = cells.map((cell, index) => ({
    ...cell,
    index,
    standardId: standard.id,
    dials: [cell.nominalOhms / 1e6],
    standardOhms: cell.nominalOhms,
    standardUncertaintyOhms: cell.nominalOhms / 1000,
    highestVolts: cell.testVolts * 1.2,
    limitOhms: cell.nominalOhms * 0.02,
    settling,
    readings: 2,
    timeConstantSeconds: 0.3,
    forecastSeconds: 4,
  }));
  return {
    runNumber: 214,
    recipe: { recipeId: "recipe-1", version: 1, document },
    decisionRule: document.decisionRule,
    unit,
    bench,
    plan: { points, excluded: [] },
    condition: "as-found",
    room: { celsius: 22.8, humidityPercent: 41 },
    cautions: [],
    by: person,
    clockSpeed: 1,
    appVersion: "0.1.0",
  };
}

function judgementOf(nominalOhms: number, errorPercent: number): unknown {
  return {
    verdict: Math.abs(errorPercent) <= 2 ? "inside" : "outside",
    rule: { kind: "simple" },
    standardOhms: nominalOhms,
    indicationOhms: nominalOhms * (1 + errorPercent / 100),
    errorOhms: (nominalOhms * errorPercent) / 100,
    errorPercent,
    limitOhms: nominalOhms * 0.02,
    limitPercent: 2,
    statementRow: 0,
    resolutionOhms: 1000,
    readings: 2,
    deviationOhms: 10,
    uncertainty: null,
    settlingSeconds: 2,
  };
}

interface Draft {
  type: string;
  data: unknown;
  afterMs: number;
}

/** Records of one attempt up to its end. */
function attempt(point: number, number: number, readings: number): Draft[] {
  const { nominalOhms, testVolts } = cells[point]!;
  const reading = (index: number): Draft => ({
    type: "reading.taken",
    afterMs: 500,
    data: {
      point,
      attempt: number,
      phase: index < readings - 2 ? "settling" : "averaging",
      ohms: nominalOhms * (1 - Math.exp(-index - 1)),
      volts: testVolts,
      amperes: testVolts / nominalOhms,
      flags: [],
      raw: `${nominalOhms}`,
    },
  });
  return [
    { type: "point.started", afterMs: 10, data: { point, attempt: number } },
    { type: "output.off-proven", afterMs: 20, data: { terminalVolts: 0.4 } },
    { type: "dials.set", afterMs: 200, data: { positions: [nominalOhms / 1e6], standardId: "box-1", nominalOhms } },
    { type: "voltage.selected", afterMs: 50, data: { testVolts } },
    { type: "output.switching-on", afterMs: 1, data: { testVolts } },
    { type: "output.switched-on", afterMs: 300, data: { terminalVolts: testVolts } },
    ...Array.from({ length: readings }, (_, index) => reading(index)),
  ];
}

function judged(point: number, errorPercent: number): Draft[] {
  return [
    { type: "output.off-proven", afterMs: 300, data: { terminalVolts: 0.6 } },
    {
      type: "point.judged",
      afterMs: 1,
      data: { point, attempt: 1, judgement: judgementOf(cells[point]!.nominalOhms, errorPercent) },
    },
  ];
}

/** A run of four points: the second was interrupted and measured again, the third is outside, the fourth was skipped. */
export function sampleJournal(): RunEvent[] {
  const drafts: Draft[] = [
    { type: "run.started", afterMs: 0, data: startOf() },
    ...attempt(0, 1, 6),
    ...judged(0, 0.4),
    ...attempt(1, 1, 2),
    { type: "run.interrupted", afterMs: 100, data: { reason: "The server stopped at point 2." } },
    { type: "run.resumed", afterMs: 3_600_000, data: { by: person, room: { celsius: 19.1, humidityPercent: 40 } } },
    ...attempt(1, 2, 6),
    ...judged(1, -0.2),
    ...attempt(2, 1, 6),
    ...judged(2, -4.1),
    { type: "point.skipped", afterMs: 10, data: { point: 3, by: person } },
    { type: "run.finished", afterMs: 10, data: { judged: 3, skipped: 1 } },
  ];
  let elapsedMs = 0;
  return drafts.map(({ type, data, afterMs }, index) => {
    elapsedMs += afterMs;
    return parseRunEvent({ seq: index + 1, atMs: 1_796_000_000_000 + elapsedMs, elapsedMs, type, data });
  });
}

export const foldAll = (records: readonly RunEvent[]) => records.reduce(applyRunEvent, emptyRun);

/** As the journal comes over HTTP. */
export function toColumns(journal: RunEvent[]): JournalColumns {
  const taken = journal.filter((record): record is RunEventOf<"reading.taken"> => record.type === "reading.taken");
  const readings: ReadingColumns = {
    seq: taken.map((record) => record.seq),
    atMs: taken.map((record) => record.atMs),
    elapsedMs: taken.map((record) => record.elapsedMs),
    point: taken.map((record) => record.data.point),
    attempt: taken.map((record) => record.data.attempt),
    phase: taken.map((record) => record.data.phase),
    ohms: taken.map((record) => record.data.ohms),
    volts: taken.map((record) => record.data.volts),
    amperes: taken.map((record) => record.data.amperes),
    flags: taken.map((record) => record.data.flags),
    raw: taken.map((record) => record.data.raw),
  };
  return { events: journal.filter((record) => record.type !== "reading.taken"), readings };
}
