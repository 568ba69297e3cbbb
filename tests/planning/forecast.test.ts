import { describe, expect, it } from "vitest";
import {
  forecastPointSeconds,
  forecastRunSeconds,
  forecastSettlingSeconds,
  POINT_OVERHEAD_SECONDS,
} from "@/lib/planning/forecast";
import { planRun } from "@/lib/planning/plan";
import type { UntilSteady } from "@/lib/schemas/settling";
import { studySettling } from "../metrology/settling-study";
import { bench, model, recipe, section } from "./builders";

const steady: UntilSteady = {
  kind: "steady",
  driftPercentPerMinute: 0.5,
  spreadPercent: 1,
  displayUpdates: 3,
  leastSeconds: 5,
  mostSeconds: 120,
};

describe("forecastSettlingSeconds", () => {
  it("rounds a wait up to the display update that ends it", () => {
    expect(forecastSettlingSeconds({ kind: "fixed", waitSeconds: 3 }, 9, 0.5)).toBe(3);
    expect(forecastSettlingSeconds({ kind: "fixed", waitSeconds: 3.1 }, 9, 0.5)).toBe(3.5);
    expect(forecastSettlingSeconds({ kind: "fixed", waitSeconds: 0 }, 9, 0.5)).toBe(0.5);
    expect(forecastSettlingSeconds({ kind: "scaled", baseSeconds: 4, timeConstants: 7 }, 2, 0.5)).toBe(18);
  });

  it("waits until steady at least its least time, at most its greatest", () => {
    expect(forecastSettlingSeconds(steady, 0.1, 0.5)).toBe(5);
    expect(forecastSettlingSeconds(steady, 1000, 0.5)).toBe(120);
  });

  it("follows tau·ln(1/eps), 5.30 tau to 0.5 % (metrology.md section 3, computed)", () => {
    const seconds = forecastSettlingSeconds(steady, 10, 0.5);
    expect(seconds).toBeGreaterThanOrEqual(52.98);
    expect(seconds).toBeLessThanOrEqual(52.98 + 2);
  });

  it("foresees what the detector takes over many traces within a quarter", () => {
    const policy = { ...steady, leastSeconds: 0, mostSeconds: 600 };
    const { trials } = studySettling({ traces: 150, seed: 5, policy, readings: 5, secondLag: 0 });
    const taken = trials.reduce((sum, { seconds }) => sum + seconds, 0);
    const foreseen = trials.reduce(
      (sum, { trace }) => sum + forecastSettlingSeconds(policy, trace.timeConstantSeconds, trace.updateSeconds),
      0,
    );
    expect(foreseen / taken).toBeGreaterThan(0.75);
    expect(foreseen / taken).toBeLessThan(1.25);
  });
});

describe("forecasts of points and runs", () => {
  it("add readings and what every point costs", () => {
    const pace = {
      settling: { kind: "fixed", waitSeconds: 3 },
      timeConstantSeconds: 1,
      readings: 5,
      displayUpdateSeconds: 0.5,
    } as const;
    expect(forecastPointSeconds(pace)).toBe(3 + 2.5 + POINT_OVERHEAD_SECONDS);
  });

  it("sum up to the run", () => {
    const plan = planRun({
      document: recipe(section()),
      bench: bench(),
      model: model(),
      room: { celsius: 23, humidityPercent: null },
    });
    expect(forecastRunSeconds(plan)).toBe(4 * (3 + 2.5 + POINT_OVERHEAD_SECONDS));
    expect(forecastRunSeconds({ points: [], excluded: [] })).toBe(0);
  });
});
