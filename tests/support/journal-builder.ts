import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { Actor } from "@/lib/schemas/person";
import type { PlannedPoint } from "@/lib/schemas/plan";
import type { NewRunEvent, RunEvent, RunEventData, Verdict } from "@/lib/schemas/run-event";
import { amperes, farads, ohms, volts } from "@/lib/units/quantities";

const ines: Actor = { id: "ines", name: "Ines Marlow" };

function plannedPoint(index: number, nominal: number, testVolts: number): PlannedPoint {
  return {
    index,
    nominalOhms: ohms(nominal),
    testVolts: volts(testVolts),
    standardId: "box",
    dials: [nominal / 1e9],
    standardOhms: ohms(nominal),
    standardUncertaintyOhms: nominal * 0.002,
    highestVolts: volts(testVolts * 1.25),
    limitOhms: nominal * 0.05,
    settling: { kind: "fixed", waitSeconds: 5 },
    readings: 2,
    timeConstantSeconds: 1,
    forecastSeconds: 10,
  };
}

/** Two resistances at two voltages on a one-decade box: enough to fold every kind of record. */
export const smallSetup: RunEventData<"run.started"> = {
  runNumber: 7,
  recipe: {
    recipeId: "recipe",
    version: 1,
    document: {
      name: "Small check",
      purpose: "",
      decisionRule: { kind: "simple" },
      sections: [
        {
          kind: "resistance",
          nominalOhms: [ohms(1e9), ohms(2e9)],
          testVolts: [volts(250), volts(500)],
          excluded: [],
          settling: { kind: "fixed", waitSeconds: 5 },
          readingsPerPoint: 2,
          order: "by-voltage",
        },
      ],
    },
  },
  decisionRule: { kind: "simple" },
  unit: {
    id: "unit",
    serialNumber: "S-1",
    assetNumber: "TW-0001",
    model: {
      id: "model",
      maker: "Pellham",
      model: "IR-10",
      testVolts: [volts(250), volts(500)],
      ranges: [{ toOhms: ohms(1e11), resolutionOhms: ohms(1e7) }],
      accuracy: [
        { testVolts: [], fromOhms: ohms(0), toOhms: ohms(1e11), percentOfReading: 3, digits: 2, percentPerGigaohm: 0 },
      ],
      statementEdition: "2025",
      openCircuitFactor: 1.25,
      shortCircuitAmperes: amperes(0.002),
      displayUpdateSeconds: 0.5,
      filterSeconds: 0.3,
    },
  },
  bench: {
    id: "bench",
    name: "North bench",
    room: "Room 2",
    ratedVolts: volts(1500),
    capacitanceFarads: farads(1.5e-10),
    dischargedVolts: volts(30),
    roomLimits: { lowestCelsius: 18, highestCelsius: 28, highestHumidityPercent: 70 },
    devices: [],
    standard: {
      id: "box",
      kind: "decade-box",
      maker: "Corvane",
      model: "DB-1",
      name: "DB-1",
      serialNumber: "B-1",
      ratedVolts: volts(1500),
      residualOhms: ohms(0),
      referenceCelsius: 23,
      decades: [
        {
          stepOhms: ohms(1e9),
          highestPosition: 9,
          correctionsOhms: Array.from({ length: 10 }, () => 0),
          uncertaintyPercent: 0.2,
          temperatureCoefficientPpmPerKelvin: 0,
          voltageCoefficientPpmPerVolt: 0,
          ratedVolts: volts(1500),
          ratedAmperes: amperes(0.01),
          ratedWatts: 1,
        },
      ],
      calibration: { certificate: "C-1", calibratedOn: "2026-01-01", dueOn: "2027-01-01" },
    },
  },
  plan: {
    points: [
      plannedPoint(0, 1e9, 250),
      plannedPoint(1, 2e9, 250),
      plannedPoint(2, 1e9, 500),
      plannedPoint(3, 2e9, 500),
    ],
    excluded: [],
  },
  condition: "as-found",
  room: { celsius: 23, humidityPercent: 40 },
  cautions: [],
  by: ines,
  clockSpeed: 1,
  appVersion: "0",
};

/** Writes a journal record by record, with time passing half a second each. */
export class JournalBuilder {
  readonly records: RunEvent[] = [];
  #point = 0;
  readonly #attempts = new Map<number, number>();

  add(event: NewRunEvent): this {
    const seq = this.records.length + 1;
    this.records.push({ seq, atMs: 1_790_000_000_000 + seq * 500, elapsedMs: seq * 500, ...event } as RunEvent);
    return this;
  }

  started(): this {
    return this.add({ type: "run.started", data: smallSetup });
  }

  pointStarted(point: number): this {
    this.#point = point;
    this.#attempts.set(point, (this.#attempts.get(point) ?? 0) + 1);
    return this.add({ type: "point.started", data: this.#id() });
  }

  offProven(): this {
    return this.add({ type: "output.off-proven", data: { terminalVolts: 0.4 } });
  }

  switchingOn(): this {
    return this.add({ type: "output.switching-on", data: { testVolts: volts(250) } });
  }

  switchedOn(): this {
    return this.add({ type: "output.switched-on", data: { terminalVolts: 251 } });
  }

  reading(value: number, phase: "settling" | "averaging" = "settling"): this {
    const data = { ...this.#id(), phase, ohms: ohms(value), volts: null, amperes: null, flags: [], raw: String(value) };
    return this.add({ type: "reading.taken", data });
  }

  judged(point: number, verdict: Verdict): this {
    const planned = smallSetup.plan.points[point]!;
    const errorPercent = verdict === "outside" ? -7 : -0.4;
    this.pointStarted(point);
    return this.add({
      type: "point.judged",
      data: {
        ...this.#id(),
        judgement: {
          verdict,
          rule: { kind: "simple" },
          standardOhms: planned.standardOhms,
          indicationOhms: ohms(planned.nominalOhms * (1 + errorPercent / 100)),
          errorOhms: (planned.nominalOhms * errorPercent) / 100,
          errorPercent,
          limitOhms: planned.limitOhms,
          limitPercent: 5,
          statementRow: 0,
          resolutionOhms: 1e7,
          readings: 2,
          deviationOhms: 0,
          uncertainty: null,
          settlingSeconds: 5,
        },
      },
    });
  }

  skipped(point: number, by: Actor): this {
    return this.add({ type: "point.skipped", data: { point, by } });
  }

  held(by: Actor): this {
    return this.add({ type: "run.held", data: { by, reason: null } });
  }

  stopped(by: Actor): this {
    return this.add({ type: "run.stopped", data: { by, reason: null } });
  }

  unproven(): this {
    return this.add({ type: "output.unproven", data: { reason: "the tester did not answer" } });
  }

  faulted(): this {
    return this.add({
      type: "run.faulted",
      data: { code: "no-answer", message: "The tester did not answer.", cure: "Check its cable." },
    });
  }

  interrupted(): this {
    return this.add({ type: "run.interrupted", data: { reason: "Stepwell stopped running." } });
  }

  finished(): this {
    return this.add({ type: "run.finished", data: { judged: 4, skipped: 0 } });
  }

  state(): RunState {
    return this.records.reduce(applyRunEvent, emptyRun);
  }

  #id() {
    return { point: this.#point, attempt: this.#attempts.get(this.#point) ?? 1 };
  }
}

export function journalOf(write: (run: JournalBuilder) => unknown): JournalBuilder {
  const builder = new JournalBuilder();
  write(builder);
  return builder;
}
