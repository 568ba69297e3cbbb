import type uPlot from "uplot";
import { formatErrorPercent, formatQuantity } from "@/lib/units/format";
import { axis, decimalsOf } from "@/components/chart/axes";
import { withPen } from "@/components/chart/draw";
import { percentRange } from "@/components/chart/percent-range";
import type { PlotKind } from "@/components/chart/plot";
import { allPoints, drawLimits, drawSeries, type ErrorChartFrame } from "./error-chart-drawing";
import { resistancesOf } from "./error-series";

/** Room at the right for the voltages' names. */
const NAMES_WIDTH = 58;

/** Errors against resistance on a logarithmic axis, one line a test voltage. */
export const errorChartKind: PlotKind<ErrorChartFrame> = {
  data: ({ series }) => [resistancesOf(series), resistancesOf(series).map(() => 0)],
  options: (read) => ({
    padding: [24, NAMES_WIDTH, 0, 0],
    legend: { show: false },
    cursor: { show: false },
    scales: {
      x: { time: false, distr: 3, range: () => ohmRange(read.frame()) },
      y: { range: () => percentRange(allPoints(read.frame())) },
    },
    axes: [
      axis(
        {
          colours: read.colours,
          size: 30,
          space: 64,
          splits: (u) => decades(u),
          values: (_, splits) => splits.map((ohms) => formatQuantity(ohms, "Ω", { digits: 1 })),
        },
        "bottom",
        true,
      ),
      axis(
        {
          colours: read.colours,
          size: 56,
          space: 44,
          values: (_u, splits, _a, _s, step) => splits.map((value) => formatErrorPercent(value, decimalsOf(step))),
        },
        "left",
        true,
      ),
    ],
    series: [{}, { paths: () => null, points: { show: false } }],
    hooks: {
      drawClear: [(u) => withPen(u, (pen) => drawLimits(pen, read.frame(), read.colours()))],
      draw: [(u) => withPen(u, (pen) => drawSeries(pen, read.frame(), read.colours()), true)],
    },
  }),
};

/** From the first resistance to the last, a little room at both ends. */
function ohmRange({ series }: ErrorChartFrame): [number, number] {
  const ohms = resistancesOf(series);
  return [(ohms[0] ?? 1e5) / 1.25, (ohms.at(-1) ?? 1e9) * 1.25];
}

/** Powers of ten, fewer where the chart is narrow. */
function decades(u: uPlot): number[] {
  const { min = 1, max = 10 } = u.scales.x!;
  const from = Math.ceil(Math.log10(min) - 1e-9);
  const to = Math.floor(Math.log10(max) + 1e-9);
  const room = Math.max(1, Math.floor((u.bbox.width || 600) / devicePixelRatio / 64));
  const every = Math.max(1, Math.ceil((to - from + 1) / room));
  return Array.from({ length: Math.floor((to - from) / every) + 1 }, (_, index) => 10 ** (from + index * every));
}
