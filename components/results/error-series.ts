import type { RunState } from "@/lib/journal/run-state";
import type { Verdict } from "@/lib/schemas/run-event";

export interface ErrorPoint {
  nominalOhms: number;
  /** Null when the display was over its range. */
  errorPercent: number | null;
  limitPercent: number | null;
  /** Expanded uncertainty in per cent of the standard's value; null until a budget is evaluated. */
  uncertaintyPercent: number | null;
  verdict: Verdict;
}

/** Judged points of one test voltage, by rising resistance. */
export interface ErrorSeries {
  testVolts: number;
  points: ErrorPoint[];
}

/** Errors against resistance, one series for each test voltage, both rising. */
export function errorSeries(state: RunState): ErrorSeries[] {
  const series = new Map<number, ErrorPoint[]>();
  for (const planned of state.setup?.plan.points ?? []) {
    const judgement = state.points[planned.index]?.judgement;
    if (!judgement) continue;
    const { uncertainty, standardOhms } = judgement;
    const point: ErrorPoint = {
      nominalOhms: planned.nominalOhms,
      errorPercent: judgement.errorPercent,
      limitPercent: judgement.limitPercent,
      uncertaintyPercent: uncertainty && (uncertainty.expandedOhms / standardOhms) * 100,
      verdict: judgement.verdict,
    };
    series.set(planned.testVolts, [...(series.get(planned.testVolts) ?? []), point]);
  }
  return [...series]
    .map(([testVolts, points]) => ({ testVolts, points: points.sort((a, b) => a.nominalOhms - b.nominalOhms) }))
    .sort((a, b) => a.testVolts - b.testVolts);
}

/** The voltage whose limits are drawn at first: the middle one. */
export function middleVolts(series: readonly ErrorSeries[]): number | null {
  return series[Math.floor(series.length / 2)]?.testVolts ?? null;
}

/** All resistances of the series, rising. */
export function resistancesOf(series: readonly ErrorSeries[]): number[] {
  return [...new Set(series.flatMap(({ points }) => points.map((point) => point.nominalOhms)))].sort((a, b) => a - b);
}
