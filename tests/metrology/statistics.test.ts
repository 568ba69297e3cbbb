import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { deviationOfMean, fitLine, mean, sampleDeviation } from "@/lib/metrology/statistics";
import { isMetrologyError } from "@/lib/metrology/metrology-error";
import { errorFrom } from "./builders";

/** NIST StRD, univariate, Michelso: Michelson's 100 values of 1879 are 299 + v/1000 (from memory, reproduced). */
const michelson = (
  "850 740 900 1070 930 850 950 980 980 880 1000 980 930 650 760 810 1000 1000 960 960 960 940 960 940 880 800 850 880 " +
  "900 840 830 790 810 880 880 830 800 790 760 800 880 880 880 860 720 720 620 860 970 950 880 910 850 870 840 840 850 " +
  "840 840 840 890 810 810 820 800 770 760 740 750 760 910 920 890 860 880 720 840 850 850 780 890 840 780 810 760 810 " +
  "790 810 820 850 870 870 810 740 810 940 950 800 810 870"
)
  .split(" ")
  .map((text) => Number(`299.${text.padStart(4, "0").slice(1)}`) + (Number(text) >= 1000 ? 1 : 0));

/** NIST StRD, linear regression, Norris: pairs of y and x (from memory, reproduced). */
const norris = (
  "0.1 0.2; 338.8 337.4; 118.1 118.2; 888.0 884.6; 9.2 10.1; 228.1 226.5; 668.5 666.3; 998.5 996.3; 449.1 448.6; " +
  "778.9 777.0; 559.2 558.2; 0.3 0.4; 0.1 0.6; 778.1 775.5; 668.8 666.9; 339.3 338.0; 448.9 447.5; 10.8 11.6; " +
  "557.7 556.0; 228.3 228.1; 998.0 995.8; 888.8 887.6; 119.6 120.2; 0.3 0.3; 0.6 0.3; 557.6 556.8; 339.3 339.1; " +
  "888.0 887.2; 998.5 999.0; 778.9 779.0; 10.2 11.1; 117.6 118.3; 228.9 229.2; 668.4 669.1; 449.2 448.9; 0.2 0.5"
)
  .split("; ")
  .map((pair) => pair.split(" ").map(Number) as [number, number]);

describe("mean and deviation", () => {
  it("meet the certified values of Michelso (NIST StRD; certified values from memory, reproduced)", () => {
    expect(michelson).toHaveLength(100);
    expect(mean(michelson)).toBeCloseTo(299.8524, 12);
    expect(sampleDeviation(michelson)).toBeCloseTo(0.0790105478190518, 12);
  });

  it("give the Type A uncertainty of five readings (GUM 4.2; A1, computed)", () => {
    const readings = [9.7, 9.72, 9.71, 9.71, 9.73];
    expect(mean(readings)).toBeCloseTo(9.714, 12);
    expect(sampleDeviation(readings)).toBeCloseTo(0.0114018, 7);
    expect(deviationOfMean(readings)).toBeCloseTo(0.005099, 7);
  });

  it("keep their digits when the spread is a trillionth of the mean", () => {
    const readings = [1, 2, 3, 4, 5].map((step) => 1e10 + step / 100);
    expect(sampleDeviation(readings)).toBeCloseTo(Math.sqrt(2.5) / 100, 6);
  });

  it("give a deviation of exactly nothing for equal readings", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e12, noNaN: true }), fc.integer({ min: 2, max: 30 }), (value, count) => {
        expect(sampleDeviation(Array.from({ length: count }, () => value))).toBe(0);
      }),
    );
  });

  it("lie between the least and the greatest value", () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1e12, max: 1e12, noNaN: true }), { minLength: 1 }), (values) => {
        const slack = 1e-9 * Math.max(1, ...values.map(Math.abs));
        expect(mean(values)).toBeGreaterThanOrEqual(Math.min(...values) - slack);
        expect(mean(values)).toBeLessThanOrEqual(Math.max(...values) + slack);
      }),
    );
  });

  it("name the field of a value that no formula can use", () => {
    expect(errorFrom(() => mean([])).field).toBe("values");
    expect(errorFrom(() => sampleDeviation([1])).message).toBe("values must hold at least 2 values");
    const error = errorFrom(() => mean([1, NaN], "readings"));
    expect(error.field).toBe("readings[1]");
    expect(isMetrologyError(error)).toBe(true);
    expect(errorFrom(() => sampleDeviation([1, Infinity])).field).toBe("values[1]");
  });
});

describe("fitLine", () => {
  it("meets the certified values of Norris (NIST StRD; certified values from memory, reproduced)", () => {
    expect(norris).toHaveLength(36);
    const line = fitLine(
      norris.map(([, x]) => x),
      norris.map(([y]) => y),
    );
    expect(line.intercept).toBeCloseTo(-0.262323073774029, 11);
    expect(line.slope).toBeCloseTo(1.00211681802045, 13);
    expect(line.slopeUncertainty).toBeCloseTo(0.000429796848199937, 14);
  });

  it("refuses lists that no line goes through", () => {
    expect(errorFrom(() => fitLine([1, 2], [1])).field).toBe("y");
    expect(errorFrom(() => fitLine([1, 2, 3], [1, 2])).message).toBe("y has 2 values for 3 of x");
    expect(errorFrom(() => fitLine([2, 2], [1, 3])).field).toBe("x");
    expect(errorFrom(() => fitLine([1, NaN], [1, 3])).field).toBe("x[1]");
  });
});
