import { describe, expect, it } from "vitest";
import { studyPolicy, studySettling } from "./settling-study";

/** Small samples from fixed seeds; the study over thousands of traces is run as a measurement. */
describe("the settling detector over generated traces", () => {
  it("takes at least 99 % of the points within their tolerance, in at most 1.5 times an oracle's time", () => {
    const study = studySettling({ traces: 300, seed: 20_261_001, policy: studyPolicy, readings: 5, secondLag: 0 });
    expect(study.trials).toHaveLength(300);
    expect(study.shareWithin).toBeGreaterThanOrEqual(0.99);
    expect(study.timeRatio).toBeLessThanOrEqual(1.5);
    expect(study.timeOfFixedWait).toBeLessThanOrEqual(1 / 3);
    expect(study.unsettled).toBe(0);
  });

  it("holds its share where a filter behind the terminals makes the rise no plain exponential", () => {
    const study = studySettling({ traces: 200, seed: 7, policy: studyPolicy, readings: 5, secondLag: 0.3 });
    expect(study.shareWithin).toBeGreaterThanOrEqual(0.985);
    expect(study.timeRatio).toBeLessThanOrEqual(1.7);
    expect(study.unsettled).toBe(0);
  });
});
