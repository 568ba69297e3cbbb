import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { seriesBetween, seriesMantissas, type SeriesName } from "@/lib/planning/series";
import { errorFrom } from "../metrology/builders";

const name = fc.constantFrom(...(Object.keys(seriesMantissas) as SeriesName[]));

describe("seriesBetween", () => {
  it("gives E6, E12 and E24 of IEC 60063 (E1; from memory)", () => {
    const e6 = [1.0, 1.5, 2.2, 3.3, 4.7, 6.8];
    const e12 = [...e6, 1.2, 1.8, 2.7, 3.9, 5.6, 8.2].sort((a, b) => a - b);
    const e24 = [...e12, 1.1, 1.3, 1.6, 2.0, 2.4, 3.0, 3.6, 4.3, 5.1, 6.2, 7.5, 9.1].sort((a, b) => a - b);
    expect(seriesBetween("E6", 1, 9.9)).toEqual(e6);
    expect(seriesBetween("E12", 1, 9.9)).toEqual(e12);
    expect(seriesBetween("E24", 1, 9.9)).toEqual(e24);
  });

  it("runs over several decades with both ends, free of binary artefacts", () => {
    expect(seriesBetween("1-2-5", 100e3, 10e6)).toEqual([100e3, 200e3, 500e3, 1e6, 2e6, 5e6, 10e6]);
    expect(seriesBetween("E6", 4.7e6, 4.7e6)).toEqual([4700000]);
    expect(seriesBetween("1-2-5", 0.1, 1)).toEqual([0.1, 0.2, 0.5, 1]);
  });

  it("is empty where the series has no value", () => {
    expect(seriesBetween("1-2-5", 6, 9)).toEqual([]);
  });

  it("rises within its ends, and each value stands once", () => {
    const end = fc.double({ min: 1e-3, max: 1e12, noNaN: true });
    fc.assert(
      fc.property(name, end, end, (series, one, other) => {
        const [from, to] = one < other ? [one, other] : [other, one];
        const values = seriesBetween(series, from, to);
        values.forEach((value, index) => {
          expect(value).toBeGreaterThanOrEqual(from);
          expect(value).toBeLessThanOrEqual(to);
          if (index > 0) expect(value).toBeGreaterThan(values[index - 1]!);
        });
      }),
    );
  });

  it("names the end that it cannot use", () => {
    for (const value of [NaN, Infinity, 0, -1]) {
      expect(errorFrom(() => seriesBetween("E6", value, 10))).toMatchObject({
        name: "MetrologyError",
        field: "fromValue",
      });
      expect(errorFrom(() => seriesBetween("E6", 1, value)).field).toBe("toValue");
    }
    expect(errorFrom(() => seriesBetween("E6", 10, 1)).field).toBe("fromValue");
  });
});
