import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { judgePoint, type PointMeasurement } from "@/lib/metrology/judgement";
import { judgementSchema } from "@/lib/schemas/run-event";
import { ohms, volts } from "@/lib/units/quantities";
import { errorFrom, range, row } from "./builders";

const GIGA = 1e9;

/** 10 GΩ at 500 V, read five times, with 2 % and 2 digits stated up to 100 GΩ. */
function measurement(changes: Partial<PointMeasurement> = {}): PointMeasurement {
  return {
    point: { nominalOhms: ohms(10 * GIGA), testVolts: volts(500) },
    rows: [row({ toOhms: 100 * GIGA, percentOfReading: 2, digits: 2 })],
    ranges: [range(4 * GIGA, 1e6), range(40 * GIGA, 1e7), range(200 * GIGA, 1e9)],
    readings: [9.87, 9.88, 9.87, 9.86, 9.87].map((value) => value * GIGA),
    overRange: false,
    settled: true,
    settlingSeconds: 18,
    rule: { kind: "simple" },
    standardOhms: 9.987 * GIGA,
    ...changes,
  };
}

describe("judgePoint", () => {
  it("gives error against the corrected value, limit at the indication, and verdict", () => {
    const judgement = judgePoint(measurement());
    expect(judgement.verdict).toBe("inside");
    expect(judgement.indicationOhms).toBeCloseTo(9.87 * GIGA, 0);
    expect(judgement.errorOhms).toBeCloseTo(-0.117 * GIGA, 0);
    expect(judgement.errorPercent).toBeCloseTo((-100 * 0.117) / 9.987, 9);
    expect(judgement.limitOhms).toBeCloseTo((0.02 * 9.87 + 0.02) * GIGA, 0);
    expect(judgement.limitPercent).toBeCloseTo((100 * 0.2174) / 9.987, 9);
    expect(judgement).toMatchObject({ statementRow: 0, resolutionOhms: 1e7, readings: 5, settlingSeconds: 18 });
    expect(judgement.deviationOhms).toBeCloseTo(Math.sqrt(0.5) * 0.01 * GIGA, 0);
  });

  it.each([
    [10, 9.5602294, -4.3977],
    [10, 9.9009901, -0.9901],
    [90, 84.586466, -6.015],
  ])(
    "finds the error of %d GΩ read as %d GΩ (L1: g 0.001, leakage 2 TΩ, offset 0.2 nA; computed)",
    (standard, reading, percent) => {
      const judgement = judgePoint(measurement({ standardOhms: standard * GIGA, readings: [reading * GIGA] }));
      expect(judgement.errorPercent).toBeCloseTo(percent, 4);
      expect(judgement.deviationOhms).toBeNull();
    },
  );

  it("is outside beyond the limit on either side, and inside at it", () => {
    const at = (reading: number) =>
      judgePoint(measurement({ standardOhms: 10 * GIGA, readings: [reading * GIGA] })).verdict;
    expect(at(9.61)).toBe("outside");
    expect(at(9.8)).toBe("inside");
    expect(at(10.2)).toBe("inside");
    expect(at(10.25)).toBe("outside");
    const exact = measurement({
      rows: [row({ percentOfReading: 2, digits: 2 })],
      readings: [9.6 * GIGA],
      standardOhms: (9.6 + 0.212) * GIGA,
    });
    expect(judgePoint(exact).verdict).toBe("inside");
  });

  it("is never inside when unsettled, whatever was read", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 200 * GIGA, noNaN: true }), { minLength: 1, maxLength: 12 }),
        fc.double({ min: 1, max: 100 * GIGA, noNaN: true }),
        fc.boolean(),
        (readings, standardOhms, overRange) => {
          const judgement = judgePoint(measurement({ readings, standardOhms, overRange, settled: false }));
          expect(judgement.verdict).toBe("unsettled");
          expect(judgementSchema.safeParse(judgement).success).toBe(true);
        },
      ),
    );
  });

  it("is not stated where the statement says nothing", () => {
    const silent = [row({ fromOhms: 1e6, toOhms: 1 * GIGA, percentOfReading: 2 })];
    const judgement = judgePoint(measurement({ rows: silent }));
    expect(judgement).toMatchObject({ verdict: "not-stated", limitOhms: null, limitPercent: null, statementRow: null });
    expect(judgement.errorOhms).toBeCloseTo(-0.117 * GIGA, 0);
    expect(judgePoint(measurement({ rows: [] })).verdict).toBe("not-stated");
  });

  it("does not let a reading escape its limit by lying beyond the stated end", () => {
    const upToTen = [row({ toOhms: 10 * GIGA, percentOfReading: 2 })];
    const judgement = judgePoint(measurement({ rows: upToTen, readings: [13 * GIGA] }));
    expect(judgement.verdict).toBe("outside");
    expect(judgement.limitOhms).toBeCloseTo(0.02 * 9.987 * GIGA, 0);
  });

  it("judges a point at the very end of a range by its nominal value", () => {
    const upToTen = [row({ toOhms: 10 * GIGA, percentOfReading: 2 })];
    const judgement = judgePoint(measurement({ rows: upToTen, readings: [10.06 * GIGA], standardOhms: 10.02 * GIGA }));
    expect(judgement.verdict).toBe("inside");
    expect(judgement.limitOhms).toBeCloseTo(0.2 * GIGA, 0);
  });

  it("is outside when the display is over its range at a stated resistance, and not stated beyond", () => {
    const over = { overRange: true, readings: [] };
    expect(judgePoint(measurement(over))).toMatchObject({
      verdict: "outside",
      indicationOhms: null,
      errorOhms: null,
      errorPercent: null,
      readings: 0,
    });
    const upToOne = [row({ toOhms: 1 * GIGA, percentOfReading: 2 })];
    expect(judgePoint(measurement({ ...over, rows: upToOne })).verdict).toBe("not-stated");
  });

  it("takes no mean when some of the readings were over range", () => {
    const judgement = judgePoint(measurement({ overRange: true }));
    expect(judgement.indicationOhms).toBeNull();
    expect(judgement.verdict).toBe("outside");
  });

  it("applies a guarded rule where the uncertainty is known, and says so when it cannot", () => {
    const rule = { kind: "guarded", ratio: 1 } as const;
    const uncertainty = { expandedOhms: 0.15 * GIGA, coverageFactor: 2 };
    expect(judgePoint(measurement({ rule, uncertainty }))).toMatchObject({ verdict: "doubtful", rule, uncertainty });
    expect(judgePoint(measurement({ rule }))).toMatchObject({
      verdict: "inside",
      rule: { kind: "simple" },
      uncertainty: null,
    });
  });

  it("holds only finite numbers, in the shape that the journal keeps", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 1e15, noNaN: true }), { minLength: 1, maxLength: 8 }),
        fc.double({ min: 1e-3, max: 1e15, noNaN: true }),
        (readings, standardOhms) => {
          expect(judgementSchema.safeParse(judgePoint(measurement({ readings, standardOhms }))).success).toBe(true);
        },
      ),
    );
  });

  it("names the input that it cannot use", () => {
    const field = (changes: Partial<PointMeasurement>) => errorFrom(() => judgePoint(measurement(changes))).field;
    expect(field({ readings: [] })).toBe("readings");
    expect(field({ readings: [1e9, NaN] })).toBe("readings[1]");
    expect(field({ readings: [-1] })).toBe("readings[0]");
    for (const standardOhms of [0, -1, NaN, Infinity]) expect(field({ standardOhms })).toBe("standardOhms");
    expect(field({ ranges: [] })).toBe("ranges");
    expect(field({ settlingSeconds: NaN })).toBe("settlingSeconds");
  });
});
