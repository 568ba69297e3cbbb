import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { expandedUncertaintyOhms, nominalOhmsOf } from "@/lib/metrology/decades";
import { findSetting, NEAR_ENOUGH } from "@/lib/metrology/find-setting";
import { checkRating } from "@/lib/metrology/ratings";
import type { DecadeBoxRecord } from "@/lib/schemas/instrument";
import { amperes, volts } from "@/lib/units/quantities";
import { box, decade, errorFrom } from "./builders";

/** Every setting of a box. */
function everySetting({ decades }: DecadeBoxRecord): number[][] {
  return decades.reduce<number[][]>(
    (settings, { highestPosition }) =>
      settings.flatMap((setting) =>
        Array.from({ length: highestPosition + 1 }, (_, position) => [...setting, position]),
      ),
    [[]],
  );
}

/** Error and uncertainty of the best setting, by looking at all of them; null when none is allowed. */
function bestByExhaustion(standard: DecadeBoxRecord, wanted: number, highestVolts: number) {
  const figures = everySetting(standard)
    .filter((positions) => Math.abs(nominalOhmsOf(standard, positions) - wanted) <= wanted * NEAR_ENOUGH * (1 + 1e-9))
    .filter((positions) => checkRating(standard, positions, highestVolts) === null)
    .map((positions) => figuresOf(standard, positions, wanted));
  return figures.length === 0
    ? null
    : figures.reduce((best, next) =>
        next.error < best.error || (next.error === best.error && next.uncertainty < best.uncertainty) ? next : best,
      );
}

/** Errors are rounded to a millionth of an ohm, so that equal ones are seen to be equal. */
function figuresOf(standard: DecadeBoxRecord, positions: number[], wanted: number) {
  const error = Math.round(Math.abs(nominalOhmsOf(standard, positions) - wanted) * 1e6) / 1e6;
  return { error, uncertainty: expandedUncertaintyOhms(standard, positions) };
}

/** A small box with dials 0-9 or 0-10, uncertainties and ratings of every kind. */
const smallBox = fc
  .record({
    steps: fc.constantFrom([100, 10, 1], [1000, 100, 10], [10, 1, 0.1], [50, 10, 1]),
    highestPosition: fc.constantFrom(9, 10),
    uncertainties: fc.array(fc.constantFrom(0.02, 0.1, 0.3), { minLength: 3, maxLength: 3 }),
    ratedVolts: fc.constantFrom(30, 100, 5000),
    ratedAmperes: fc.constantFrom(0.05, 0.5, 10),
    ratedWatts: fc.constantFrom(0.5, 3, 1000),
  })
  .map(({ steps, highestPosition, uncertainties, ratedVolts, ratedAmperes, ratedWatts }) =>
    box(
      steps.map((step, index) =>
        decade(step, {
          highestPosition,
          uncertaintyPercent: uncertainties[index]!,
          ratedVolts: volts(ratedVolts),
          ratedAmperes: amperes(ratedAmperes),
          ratedWatts,
        }),
      ),
      { ratedVolts: volts(1000) },
    ),
  );

describe("findSetting", () => {
  const usual = box([10e9, 1e9, 100e6, 10e6, 1e6, 100e3, 10e3, 1e3].map((step) => decade(step)));

  it("sets a value that the dials make", () => {
    expect(findSetting(usual, 90e9, 1250)).toEqual({ ok: true, positions: [9, 0, 0, 0, 0, 0, 0, 0] });
    expect(findSetting(usual, 1.234567e9, 100)).toEqual({ ok: true, positions: [0, 1, 2, 3, 4, 5, 6, 7] });
  });

  it("takes the nearest value where none is exact", () => {
    expect(findSetting(usual, 123_456, 10)).toEqual({ ok: true, positions: [0, 0, 0, 0, 0, 1, 2, 3] });
  });

  it("takes the least uncertain of several settings of one value", () => {
    const ten = box([
      decade(1e9, { highestPosition: 10, uncertaintyPercent: 0.5 }),
      decade(1e8, { highestPosition: 10, uncertaintyPercent: 0.1 }),
    ]);
    expect(findSetting(ten, 1e9, 500)).toEqual({ ok: true, positions: [0, 10] });
    expect(findSetting(ten, 1.5e9, 500)).toEqual({ ok: true, positions: [1, 5] });
  });

  it("spreads the power over a lighter decade where the heavier one would not stand it", () => {
    const weak = box([
      decade(100e3, { highestPosition: 10, ratedWatts: 0.5, uncertaintyPercent: 0.01 }),
      decade(10e3, { highestPosition: 10, ratedWatts: 5 }),
    ]);
    expect(findSetting(weak, 100e3, 200)).toEqual({ ok: true, positions: [1, 0] });
    expect(findSetting(weak, 100e3, 500)).toEqual({ ok: true, positions: [0, 10] });
  });

  it("says that the dials do not reach a value", () => {
    const found = findSetting(usual, 200e9, 500);
    expect(found).toMatchObject({ ok: false, cause: "setting" });
    expect(found).toHaveProperty("reason", expect.stringMatching(/no setting within 1 % of 200\.0.GΩ/u));
    expect(findSetting(usual, 100, 50)).toMatchObject({ ok: false, cause: "setting" });
  });

  it("says which rating forbids a value", () => {
    const rated = box([decade(100e3, { ratedWatts: 1 })]);
    expect(findSetting(rated, 100e3, 632.5)).toMatchObject({
      ok: false,
      cause: "rating",
      reason: expect.stringMatching(/^the 100.kΩ decade would stand 4\.0.W, rated 1\.0.W$/u),
    });
    expect(findSetting(box([decade(1e9)], { ratedVolts: volts(250) }), 1e9, 1000)).toMatchObject({
      ok: false,
      cause: "rating",
      reason: expect.stringMatching(/^the box would stand 1000.V, rated 250.V$/u),
    });
  });

  it("agrees with looking at every setting of a small box", () => {
    fc.assert(
      fc.property(
        smallBox,
        fc.double({ min: 1, max: 12_000, noNaN: true }).map((value) => Math.round(value * 10) / 10),
        fc.constantFrom(0, 10, 60, 250, 900, 1200),
        (standard, wanted, highestVolts) => {
          const found = findSetting(standard, wanted, highestVolts);
          const best = bestByExhaustion(standard, wanted, highestVolts);
          expect(found.ok).toBe(best !== null);
          if (!found.ok || !best) return;
          expect(checkRating(standard, found.positions, highestVolts)).toBeNull();
          const figures = figuresOf(standard, found.positions, wanted);
          expect(figures.error).toBe(best.error);
          expect(figures.uncertainty).toBeCloseTo(best.uncertainty, 9);
        },
      ),
      { numRuns: 150 },
    );
  });

  it("gives the cause by whether any setting is near enough", () => {
    fc.assert(
      fc.property(smallBox, fc.integer({ min: 1, max: 15_000 }), (standard, wanted) => {
        const found = findSetting(standard, wanted, 900);
        if (found.ok) return;
        const isReachable = bestByExhaustion({ ...standard, ratedVolts: volts(1e9) }, wanted, 0) !== null;
        expect(found.cause).toBe(isReachable ? "rating" : "setting");
      }),
      { numRuns: 100 },
    );
  });

  it("names the input that it cannot use", () => {
    for (const value of [NaN, Infinity, 0, -1])
      expect(errorFrom(() => findSetting(usual, value, 50)).field).toBe("wantedOhms");
    for (const value of [NaN, Infinity, -1])
      expect(errorFrom(() => findSetting(usual, 1e6, value)).field).toBe("highestVolts");
    expect(errorFrom(() => findSetting(box([decade(15), decade(10)]), 25, 0)).field).toBe("decades[0].stepOhms");
  });
});
