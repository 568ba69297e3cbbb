import fc from "fast-check";
import jstat from "jstat";
import { describe, expect, it } from "vitest";
import { acceptanceLimits, applyDecisionRule } from "@/lib/metrology/decision-rule";
import { normalProbability } from "@/lib/metrology/exponential";
import type { DecisionRule } from "@/lib/schemas/recipe";
import { errorFrom } from "./builders";

const simple: DecisionRule = { kind: "simple" };
const guarded: DecisionRule = { kind: "guarded", ratio: 1 };
const fourWay: DecisionRule = { kind: "four-way", ratio: 1 };

function verdict(rule: DecisionRule, errorOhms: number, expandedOhms: number | null = 2) {
  return applyDecisionRule({ rule, errorOhms, limitOhms: 10, expandedOhms });
}

describe("applyDecisionRule (ILAC-G8:09/2019, 4.2)", () => {
  it("accepts simply up to the limit itself", () => {
    expect(verdict(simple, 10)).toBe("inside");
    expect(verdict(simple, -10)).toBe("inside");
    expect(verdict(simple, 10.0001)).toBe("outside");
    expect(verdict(simple, -10.0001, null)).toBe("outside");
    expect(applyDecisionRule({ rule: simple, errorOhms: 9.812 - 9.6, limitOhms: 0.212, expandedOhms: null })).toBe(
      "inside",
    );
  });

  it("keeps a guard band inside the limit", () => {
    expect(verdict(guarded, 8)).toBe("inside");
    expect(verdict(guarded, -8.1)).toBe("doubtful");
    expect(verdict(guarded, 10)).toBe("doubtful");
    expect(verdict(guarded, 10.1)).toBe("outside");
  });

  it("keeps a guard band on both sides of the limit", () => {
    expect(verdict(fourWay, -8)).toBe("inside");
    expect(verdict(fourWay, 9.9)).toBe("doubtful");
    expect(verdict(fourWay, -11.9)).toBe("doubtful");
    expect(verdict(fourWay, 12.1)).toBe("outside");
  });

  it("can accept nothing when the guard band eats the whole limit", () => {
    expect(acceptanceLimits({ rule: guarded, limitOhms: 10, expandedOhms: 12 })).toEqual({
      acceptOhms: -2,
      rejectOhms: 10,
    });
    expect(verdict(guarded, 0, 12)).toBe("doubtful");
  });

  it("scales the guard band with its ratio", () => {
    expect(
      acceptanceLimits({ rule: { kind: "guarded", ratio: 0.83 }, limitOhms: 10, expandedOhms: 2 }).acceptOhms,
    ).toBeCloseTo(8.34, 12);
  });

  it("never accepts beyond the limit, and never accepts more with a guard band than without", () => {
    const figure = fc.double({ min: 0, max: 1e12, noNaN: true });
    const rule = fc.record({
      kind: fc.constantFrom("guarded" as const, "four-way" as const),
      ratio: fc.double({ min: 0.01, max: 3, noNaN: true }),
    });
    fc.assert(
      fc.property(rule, figure, figure, figure, (tried, errorOhms, limitOhms, expandedOhms) => {
        if (applyDecisionRule({ rule: tried, errorOhms, limitOhms, expandedOhms }) !== "inside") return;
        expect(applyDecisionRule({ rule: simple, errorOhms, limitOhms, expandedOhms })).toBe("inside");
      }),
    );
  });

  it("names the input that it cannot use", () => {
    expect(errorFrom(() => verdict(guarded, 1, null))).toMatchObject({ name: "MetrologyError", field: "expandedOhms" });
    expect(errorFrom(() => verdict(guarded, 1, -1)).field).toBe("expandedOhms");
    expect(errorFrom(() => verdict(simple, NaN)).field).toBe("errorOhms");
    for (const limitOhms of [NaN, Infinity, -1]) {
      expect(errorFrom(() => acceptanceLimits({ rule: simple, limitOhms, expandedOhms: 1 })).field).toBe("limitOhms");
    }
  });
});

describe("normalProbability", () => {
  it.each([
    [0, 0.5],
    [0.83, 0.04846],
    [1, 0.02275],
    [1.5, 0.00135],
  ])(
    "gives the chance of a false acceptance at the acceptance limit for r = %d (D1, computed; ILAC-G8 table 1 bounds from memory)",
    (ratio, expected) => {
      expect(normalProbability(-2 * ratio)).toBeCloseTo(expected, 5);
    },
  );

  it("agrees with a well-kept library", () => {
    for (let z = -6; z <= 6; z += 0.05) expect(normalProbability(z)).toBeCloseTo(jstat.normal.cdf(z, 0, 1), 6);
  });
});
