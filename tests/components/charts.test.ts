import { describe, expect, it } from "vitest";
import { decimalsOf, timeCeiling } from "@/components/chart/axes";
import { held, percentRange, percentReach } from "@/components/chart/percent-range";
import { describeTrace, expectedCurve, ohmRange, ohmScale, type PointTraceData } from "@/components/trace/trace-frame";

const data: PointTraceData = {
  samples: [
    { seconds: 2, ohms: 1e9, phase: "settling" },
    { seconds: 20, ohms: 9.4e9, phase: "settling" },
    { seconds: 30, ohms: 9.6e9, phase: "settling" },
  ],
  standardOhms: 10e9,
  limitOhms: 0.5e9,
  expectedOhms: 9.8e9,
  fittedSeconds: 10,
  windowFromSeconds: 22,
  resolutionOhms: 1e7,
};

describe("the trace of a point", () => {
  it("leaves the far beginning out so that the band stays legible", () => {
    const [low, high] = ohmRange(data);
    expect(low).toBeGreaterThan(5e9);
    expect(high).toBeGreaterThan(10.5e9);
  });

  it("always has the latest value in view, however far it is", () => {
    const [low] = ohmRange({ ...data, samples: [{ seconds: 1, ohms: 2e9, phase: "settling" }] });
    expect(low).toBeLessThan(2e9);
  });

  it("goes on from the latest value to the expected end by the fitted time constant", () => {
    const curve = expectedCurve(data, 40);
    expect(curve[0]).toEqual([30, 9.6e9]);
    // One time constant later 1/e of the way is left.
    expect(curve.at(-1)![1]).toBeCloseTo(9.8e9 - 0.2e9 * Math.exp(-1), -3);
  });

  it("draws nothing where nothing is expected", () => {
    expect(expectedCurve({ ...data, expectedOhms: null }, 40)).toEqual([]);
  });

  it("takes the unit of its axis from the standard", () => {
    expect(ohmScale(data)).toEqual({ factor: 1e9, unit: "GΩ" });
    expect(ohmScale({ ...data, standardOhms: 500e3 })).toEqual({ factor: 1e3, unit: "kΩ" });
  });

  it("is told in words", () => {
    const words = describeTrace(data).replaceAll("\u2009", " ");
    expect(words).toContain("over 30 s");
    expect(words).toContain(
      "from 1.00 GΩ to 9.60 GΩ; standard 10.00 GΩ; limits ±500.0 MΩ; expected to end at 9.80 GΩ.",
    );
    expect(describeTrace({ ...data, samples: [] })).toBe("No reading yet.");
  });
});

describe("axes", () => {
  it("end a little beyond what is known, in steps", () => {
    expect(timeCeiling(0)).toBe(10);
    expect(timeCeiling(31)).toBe(45);
    expect(timeCeiling(5000)).toBe(7200);
  });

  it("have the decimals that tell their ticks apart", () => {
    expect([0.25, 0.1, 1, 20].map(decimalsOf)).toEqual([1, 1, 0, 0]);
  });
});

describe("the axis of errors", () => {
  const points = [
    { errorPercent: -0.4, limitPercent: 5 },
    { errorPercent: -80, limitPercent: 4 },
    { errorPercent: null, limitPercent: null },
  ];

  it("holds every limit, and keeps an error that lies far beyond at its edge", () => {
    const reach = percentReach(points);
    const [low, high] = percentRange(points);
    expect(high).toBeGreaterThan(5);
    expect(low).toBeLessThan(-reach);
    expect(low).toBeGreaterThan(-80);
    expect(held(-80, reach)).toBe(-reach);
  });

  it("has a range without any point", () => {
    const [low, high] = percentRange([]);
    expect(low).toBeLessThan(high);
  });
});
