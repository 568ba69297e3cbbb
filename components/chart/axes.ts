import type uPlot from "uplot";
import type { ChartColours } from "./chart-colours";

interface AxisLook {
  colours: () => ChartColours;
  size: number;
  /** Least distance of two ticks in CSS pixels. */
  space?: number;
  incrs?: uPlot.Axis.Incrs;
  splits?: uPlot.Axis.Splits;
  values: uPlot.Axis.Values;
}

/** One axis in our look: hairlines of the grid, figures in the mono face, no ticks. */
export function axis(
  { colours, size, space = 60, incrs, splits, values }: AxisLook,
  side: "bottom" | "left",
  grid: boolean,
): uPlot.Axis {
  return {
    side: side === "bottom" ? 2 : 3,
    size,
    gap: 6,
    space,
    ...(incrs && { incrs }),
    ...(splits && { splits }),
    values,
    // A logarithmic axis would otherwise drop the ticks that it did not choose by itself.
    filter: (_, chosen) => chosen,
    stroke: () => colours().ink2,
    // The family is known once the page is styled; uPlot scales the size by itself.
    font: `12px ${colours().monoFamily}`,
    grid: { show: grid, stroke: () => colours().line, width: 0.7 },
    ticks: { show: false },
    border: { show: false },
  };
}

/** Decimals that tell ticks of this distance apart. */
export function decimalsOf(increment: number): number {
  return Math.max(0, Math.ceil(-Math.log10(increment) - 1e-9));
}

const COARSE_SECONDS = [10, 15, 20, 30, 45, 60, 90, 120, 180, 240, 300, 420, 600, 900, 1200, 1800, 2700, 3600];

/** The end of a time axis: a little beyond what is known, in steps, so that it does not creep. */
export function timeCeiling(seconds: number): number {
  const wanted = seconds * 1.15;
  return COARSE_SECONDS.find((ceiling) => ceiling >= wanted) ?? Math.ceil(wanted / 3600) * 3600;
}
