import { expect, it } from "vitest";
import { crashTrial } from "../support/crash-trial";
import { seededRandom } from "../support/seeded-random";

it("a server killed in the middle of a run loses nothing, makes the bench safe first and lets the run be resumed", async () => {
  const seed = Date.now() % 1_000_000;
  process.stdout.write(`crash sample, seed ${seed}\n`);
  const report = await crashTrial({
    kills: 3,
    recipeName: "Quick check",
    clockSpeed: 5,
    random: seededRandom(seed),
    longestWaitMs: 4000,
  });
  expect(report).toMatchObject({ lost: 0, altered: 0, gaps: 0, notOffFirst: 0, violations: [] });
  expect(report.kills).toBe(3);
  expect(report.acknowledged).toBeGreaterThan(10);
  expect(report.finalState.points.every((point) => point.outcome === "judged")).toBe(true);
});
