import { studyPolicy, studySettling } from "../metrology/settling-study";
import { printFigure } from "./figure";

/** The settling detector over generated traces; the seed is printed, so that a bad one can be looked at. */
export function measureSettling(): void {
  const seed = Number(process.env.STEPWELL_SEED ?? Date.now() % 1_000_000);
  const result = studySettling({ seed, traces: 500, policy: studyPolicy, readings: 5, secondLag: 0 });
  printFigure("settling_seed", seed, "number");
  printFigure("settling_within_tolerance", 100 * result.shareWithin, "%");
  printFigure("settling_time_of_oracle", result.timeRatio, "ratio");
  printFigure("settling_unsettled", result.unsettled, "points");
}
