import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { checkRating } from "@/lib/metrology/ratings";
import { planRun } from "@/lib/planning/plan";
import { planSchema } from "@/lib/schemas/plan";
import { farads, volts } from "@/lib/units/quantities";
import { box, decade, row } from "../metrology/builders";
import { bench, model, nineDecades, recipe, section, type SectionChanges } from "./builders";

const room = { celsius: 23, humidityPercent: 40 };

function plan(changes: SectionChanges = {}, on = bench(), unit = model()) {
  return planRun({ document: recipe(section(changes)), bench: on, model: unit, room });
}

function plain(text: string): string {
  return text.replaceAll("\u2009", " ");
}

describe("the points of a plan", () => {
  it("run by voltage: voltages rising, resistances rising within each", () => {
    const { points } = plan({ nominalOhms: [1e6, 1e9], testVolts: [250, 500] });
    expect(points.map(({ index, nominalOhms, testVolts }) => [index, nominalOhms, testVolts])).toEqual([
      [0, 1e6, 250],
      [1, 1e9, 250],
      [2, 1e6, 500],
      [3, 1e9, 500],
    ]);
  });

  it("run by resistance where the recipe says so, whatever order it was written in", () => {
    const { points } = plan({ nominalOhms: [1e9, 1e6], testVolts: [500, 250], order: "by-resistance" });
    expect(points.map(({ nominalOhms, testVolts }) => [nominalOhms, testVolts])).toEqual([
      [1e6, 250],
      [1e6, 500],
      [1e9, 250],
      [1e9, 500],
    ]);
  });

  it("are numbered through all sections", () => {
    const document = recipe(section({ nominalOhms: [1e6] }), section({ nominalOhms: [1e9] }));
    const { points } = planRun({ document, bench: bench(), model: model(), room });
    expect(points.map(({ index }) => index)).toEqual([0, 1, 2, 3]);
    expect(points.map(({ nominalOhms }) => nominalOhms)).toEqual([1e6, 1e6, 1e9, 1e9]);
  });

  it("carry setting, corrected value, uncertainty, limit and time constant", () => {
    const corrected = decade(10e9, {
      correctionsOhms: [0, ...Array.from({ length: 9 }, () => -13e6)],
      uncertaintyPercent: 0.6,
    });
    const on = bench({ standard: box([corrected, decade(1e9)]) });
    const [point] = plan({ nominalOhms: [10e9], testVolts: [500] }, on).points;
    expect(point).toMatchObject({
      standardId: "box-1",
      dials: [1, 0],
      standardOhms: 9.987e9,
      highestVolts: 625,
      readings: 5,
      settling: { kind: "fixed", waitSeconds: 3 },
    });
    expect(point!.standardUncertaintyOhms).toBeCloseTo(60e6, 0);
    expect(point!.limitOhms).toBeCloseTo(0.03 * 9.987e9 + 2 * 10e6, 0);
    // R·C plus the tester's filter.
    expect(point!.timeConstantSeconds).toBeCloseTo(9.987e9 * 150e-12 + 0.4, 9);
  });

  it("reach the time constant of 90 GΩ and 150 pF: 13.5 s (metrology.md section 3, computed)", () => {
    const [point] = plan({ nominalOhms: [90e9], testVolts: [500] }, bench(), model({ filterSeconds: 0 })).points;
    expect(point!.timeConstantSeconds).toBeCloseTo(13.5, 9);
  });

  it("correct the standard for the temperature of the room", () => {
    const on = bench({ standard: box([decade(1e9, { temperatureCoefficientPpmPerKelvin: 120 })]) });
    const warm = planRun({
      document: recipe(section({ nominalOhms: [1e9] })),
      bench: on,
      model: model(),
      room: { ...room, celsius: 28 },
    });
    expect(warm.points[0]!.standardOhms).toBeCloseTo(1e9 * (1 + 600e-6), 0);
  });

  it("expect no more than the short-circuit current times the resistance across a small standard", () => {
    const points = plan({ nominalOhms: [100e3, 1e6], testVolts: [1000] }).points;
    // 2 mA through 100 kΩ are 200 V; through 1 MΩ the open-circuit limit of 1250 V comes first.
    expect(points.map(({ highestVolts }) => highestVolts)).toEqual([200, 1250]);
  });

  it("have no limit where the statement says nothing", () => {
    const silent = model({ accuracy: [row({ fromOhms: 10e3, toOhms: 1e8, percentOfReading: 3 })] });
    expect(plan({}, bench(), silent).points.map(({ limitOhms }) => limitOhms === null)).toEqual([
      false,
      true,
      false,
      true,
    ]);
  });
});

describe("what a plan leaves out, and why", () => {
  it("leaves out what the recipe leaves out", () => {
    const { points, excluded } = plan({ excluded: [[1e9, 250]] });
    expect(points).toHaveLength(3);
    expect(excluded).toEqual([{ nominalOhms: 1e9, testVolts: 250, cause: "recipe", reason: "left out in the recipe" }]);
  });

  it("leaves out a voltage that the unit does not have", () => {
    const { excluded } = plan({ nominalOhms: [1e6], testVolts: [500, 2500] });
    expect(excluded).toMatchObject([{ testVolts: 2500, cause: "unit" }]);
    expect(plain(excluded[0]!.reason)).toBe("Pellham IR-10 has no test voltage of 2500 V");
  });

  it("leaves out what the bench is not rated for", () => {
    const { excluded } = plan({ nominalOhms: [1e9], testVolts: [500, 1000] }, bench({ ratedVolts: volts(1000) }));
    expect(excluded).toMatchObject([{ testVolts: 1000, cause: "bench" }]);
    expect(plain(excluded[0]!.reason)).toBe("North bench would stand 1250 V, rated 1000 V");
  });

  it("leaves out what the box's ratings forbid, with numbers", () => {
    const weak = box([decade(1e6), decade(100e3, { ratedWatts: 0.1 })]);
    const { points, excluded } = plan({ nominalOhms: [100e3, 1e6], testVolts: [1000] }, bench({ standard: weak }));
    expect(points.map(({ nominalOhms }) => nominalOhms)).toEqual([1e6]);
    expect(excluded).toMatchObject([{ nominalOhms: 100e3, cause: "rating" }]);
    expect(plain(excluded[0]!.reason)).toBe("the 100 kΩ decade would stand 400 mW, rated 100 mW");
  });

  it("leaves out a resistance that the dials do not make within 1 %", () => {
    const { points, excluded } = plan({ nominalOhms: [1e6, 1.5e6, 200e9] }, bench({ standard: box([decade(1e6)]) }));
    expect(points.map(({ nominalOhms }) => nominalOhms)).toEqual([1e6, 1e6]);
    expect(new Set(excluded.map(({ cause }) => cause))).toEqual(new Set(["setting"]));
    expect(excluded).toHaveLength(4);
  });

  it("puts every cell either in or out, never a point beyond a rating, in the shape that the journal keeps", () => {
    const resistances = fc.uniqueArray(fc.constantFrom(1e3, 50e3, 1e5, 1e6, 2.2e6, 1e8, 1e9, 33e9, 5e11), {
      minLength: 1,
    });
    const voltages = fc.uniqueArray(fc.constantFrom(50, 100, 250, 500, 1000, 2500), { minLength: 1 });
    const rated = fc.record({
      watts: fc.constantFrom(0.05, 0.5, 5),
      boxVolts: fc.constantFrom(250, 700, 5000),
      benchVolts: fc.constantFrom(300, 1500),
    });
    fc.assert(
      fc.property(resistances, voltages, rated, (nominalOhms, testVolts, { watts, boxVolts, benchVolts }) => {
        const decades = nineDecades.decades.map((one) => ({ ...one, ratedWatts: watts }));
        const standard = { ...nineDecades, decades, ratedVolts: volts(boxVolts) };
        const made = plan(
          { nominalOhms, testVolts },
          bench({ standard, ratedVolts: volts(benchVolts), capacitanceFarads: farads(0) }),
        );
        expect(made.points.length + made.excluded.length).toBe(nominalOhms.length * testVolts.length);
        expect(planSchema.safeParse(made).success).toBe(true);
        for (const { dials, highestVolts } of made.points) {
          expect(checkRating(standard, dials, highestVolts)).toBeNull();
          expect(highestVolts).toBeLessThanOrEqual(benchVolts);
        }
        for (const { reason } of made.excluded) expect(reason).not.toMatch(/NaN|undefined|null/u);
      }),
      { numRuns: 60 },
    );
  });
});
