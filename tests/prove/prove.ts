import { crashTrial } from "@/tests/support/crash-trial";
import { seededRandom } from "@/tests/support/seeded-random";

/** Long proofs, run whole. `npm test` runs a small sample of each. */
async function prove(): Promise<void> {
  const seed = Number(process.env.STEPWELL_SEED ?? Date.now() % 1_000_000);
  const kills = Number(process.env.STEPWELL_KILLS ?? 20);
  print(`seed ${seed}`);
  const report = await crashTrial({
    kills,
    recipeName: "Full matrix",
    clockSpeed: 60,
    random: seededRandom(seed),
    longestWaitMs: 2400,
  });
  const { finalState, ...figures } = report;
  print(
    JSON.stringify(
      {
        ...figures,
        status: finalState.status,
        judged: finalState.points.filter((point) => point.outcome === "judged").length,
        points: finalState.points.length,
      },
      null,
      2,
    ),
  );
  const isProven =
    report.lost + report.altered + report.gaps + report.notOffFirst + report.violations.length === 0 &&
    finalState.status === "finished" &&
    finalState.points.every((point) => point.outcome === "judged");
  print(isProven ? "crashes: proven" : "crashes: NOT proven");
  if (!isProven) process.exitCode = 1;
}

function print(text: string): void {
  process.stdout.write(`${text}\n`);
}

await prove();
