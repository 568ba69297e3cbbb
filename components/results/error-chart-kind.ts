import type uPlot from "uplot";
import { formatErrorPercent, formatQuantity, formatTestVolts } from "@/lib/units/format";
import { axis, decimalsOf } from "@/components/chart/axes";
import type { ChartColours } from "@/components/chart/chart-colours";
import {
  arrow,
  fillPath,
  ring,
  strokePath,
  withPen,
  writeWords,
  type LineLook,
  type Pen,
} from "@/components/chart/draw";
import type { PlotKind, PlotReader } from "@/components/chart/plot";
import { resistancesOf, type ErrorPoint, type ErrorSeries } from "./error-series";

export interface ErrorChartFrame {
  series: readonly ErrorSeries[];
  /** Test voltage whose limits are drawn as the band. */
  limitVolts: number | null;
}

type Reader = PlotReader<ErrorChartFrame>;

/** Errors up to this many of the largest limits set the axis; what lies farther stands at its edge with its figure. */
const FARTHEST_LIMITS = 1.6;
const LEAST_REACH_PERCENT = 5;

/** Errors against resistance on a logarithmic axis, one line a test voltage. */
export const errorChartKind: PlotKind<ErrorChartFrame> = {
  data: ({ series }) => [resistancesOf(series), resistancesOf(series).map(() => 0)],
  options: (read) => ({
    padding: [20, 8, 0, 0],
    legend: { show: false },
    cursor: { show: false },
    scales: {
      x: { time: false, distr: 3, range: () => ohmRange(read.frame()) },
      y: { range: () => errorRange(read.frame()) },
    },
    axes: [
      axis(
        {
          colours: read.colours,
          size: 30,
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
      drawClear: [(u) => withPen(u, (pen) => drawLimits(pen, read))],
      draw: [(u) => withPen(u, (pen) => drawSeries(pen, read), true)],
    },
  }),
};

/** A little room before the first resistance, and for the voltages' names after the last. */
function ohmRange({ series }: ErrorChartFrame): [number, number] {
  const ohms = resistancesOf(series);
  const low = ohms[0] ?? 1e5;
  const high = ohms.at(-1) ?? 1e9;
  return [low / 1.25, high * Math.max(2.2, (high / low) ** 0.1)];
}

function errorRange({ series }: ErrorChartFrame): [number, number] {
  const points = series.flatMap((each) => each.points);
  const limit = Math.max(0, ...points.map((point) => point.limitPercent ?? 0));
  const reach = Math.max(LEAST_REACH_PERCENT, FARTHEST_LIMITS * limit);
  const within = (value: number) => Math.min(reach, Math.max(-reach, value));
  const values = points.flatMap(({ errorPercent, uncertaintyPercent }) =>
    errorPercent === null ? [] : [errorPercent - (uncertaintyPercent ?? 0), errorPercent + (uncertaintyPercent ?? 0)],
  );
  const low = Math.min(-limit, -0.1, ...values.map(within));
  const high = Math.max(limit, 0.1, ...values.map(within));
  const pad = 0.06 * (high - low);
  return [low - pad, high + pad];
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

function drawLimits(pen: Pen, read: Reader): void {
  const { series, limitVolts } = read.frame();
  const { mossTint } = read.colours();
  const points = statedPoints(series, limitVolts);
  const upper = points.map((point): [number, number] => [pen.x(point.nominalOhms), pen.y(point.limitPercent)]);
  const lower = points.map((point): [number, number] => [pen.x(point.nominalOhms), pen.y(-point.limitPercent)]);
  if (points.length > 0) fillPath(pen, [...upper, ...lower.toReversed()], mossTint);
}

function statedPoints(series: readonly ErrorSeries[], limitVolts: number | null) {
  const points = series.find(({ testVolts }) => testVolts === limitVolts)?.points ?? [];
  return points.flatMap(({ nominalOhms, limitPercent }) =>
    limitPercent === null ? [] : [{ nominalOhms, limitPercent }],
  );
}

/**
 * Lines of the voltages, told apart by dash first. The verdicts' colours are left to the verdicts, so the lines go from
 * stone to water to ink.
 */
export function seriesLook(index: number, colours: ChartColours): LineLook {
  const looks: readonly LineLook[] = [
    { colour: colours.ink2, width: 1.8, dash: [2, 3] },
    { colour: colours.water, width: 1.8, dash: [6, 3] },
    { colour: colours.ink, width: 1.8, dash: [9, 3, 2, 3] },
    { colour: colours.water, width: 1.8 },
    { colour: colours.ink, width: 1.8 },
    { colour: colours.ink2, width: 1.8, dash: [12, 4] },
    { colour: colours.water, width: 1.8, dash: [9, 3, 2, 3, 2, 3] },
  ];
  return looks[index % looks.length]!;
}

function drawSeries(pen: Pen, read: Reader): void {
  const { series, limitVolts } = read.frame();
  const colours = read.colours();
  strokePath(
    pen,
    [
      [pen.left, pen.y(0)],
      [pen.right, pen.y(0)],
    ],
    { colour: colours.lineStrong, width: 1 },
  );
  series.forEach(({ points }, index) => drawLine(pen, points, seriesLook(index, colours)));
  series.forEach(({ points }, index) => {
    for (const point of points) drawPoint(pen, point, seriesLook(index, colours).colour, colours);
  });
  writeLimitName(pen, series, limitVolts, colours);
  writeNames(pen, series, colours);
  writeWords(pen, "%", pen.left - 6 * pen.ratio, pen.top - 6 * pen.ratio, {
    colour: colours.ink2,
    family: colours.monoFamily,
    align: "right",
  });
}

function drawLine(pen: Pen, points: readonly ErrorPoint[], look: LineLook): void {
  const path = points.flatMap(({ nominalOhms, errorPercent }): [number, number][] =>
    errorPercent === null ? [] : [[pen.x(nominalOhms), edgeY(pen, errorPercent)]],
  );
  strokePath(pen, path, look);
}

function drawPoint(pen: Pen, point: ErrorPoint, colour: string, colours: ChartColours): void {
  const { nominalOhms, errorPercent, uncertaintyPercent, verdict } = point;
  if (errorPercent === null) return;
  const x = pen.x(nominalOhms);
  const y = edgeY(pen, errorPercent);
  if (uncertaintyPercent !== null) {
    const ends = [errorPercent - uncertaintyPercent, errorPercent + uncertaintyPercent] as const;
    strokePath(
      pen,
      [
        [x, edgeY(pen, ends[0])],
        [x, edgeY(pen, ends[1])],
      ],
      { colour, width: 1 },
    );
  }
  if (Math.abs(y - pen.y(errorPercent)) > pen.ratio) writeFigure(pen, x, y, errorPercent, colours);
  if (verdict === "outside") arrow(pen, x, y, errorPercent < 0 ? "down" : "up", colours.brick);
  else if (verdict === "unsettled") ring(pen, x, y, 3.4, colours.plum, colours.plum);
  else ring(pen, x, y, 2.8, colour, colours.panel);
}

function writeFigure(pen: Pen, x: number, y: number, errorPercent: number, colours: ChartColours): void {
  writeWords(pen, formatErrorPercent(errorPercent, 1), x - 8 * pen.ratio, y, {
    colour: colours.ink2,
    family: colours.monoFamily,
    size: 11.5,
    align: "right",
    baseline: "middle",
    halo: colours.panel,
  });
}

/** An error beyond the axis stays at its edge. */
function edgeY(pen: Pen, percent: number): number {
  return Math.min(pen.bottom - 5 * pen.ratio, Math.max(pen.top + 5 * pen.ratio, pen.y(percent)));
}

function writeLimitName(
  pen: Pen,
  series: readonly ErrorSeries[],
  limitVolts: number | null,
  colours: ChartColours,
): void {
  const points = statedPoints(series, limitVolts);
  const first = points[0];
  if (!first || limitVolts === null) return;
  const y = pen.y(first.limitPercent) - 5 * pen.ratio;
  const isRoom = y > pen.top + 12 * pen.ratio;
  writeWords(
    pen,
    `limits at ${formatTestVolts(limitVolts)}`,
    pen.x(first.nominalOhms) + 4 * pen.ratio,
    isRoom ? y : pen.top + 14 * pen.ratio,
    {
      colour: colours.moss,
      family: colours.textFamily,
    },
  );
}

/** Each voltage's name at the end of its line; names that would cover each other are moved apart. */
function writeNames(pen: Pen, series: readonly ErrorSeries[], colours: ChartColours): void {
  const gap = 14 * pen.ratio;
  const names = series
    .flatMap(({ testVolts, points }, index) => {
      const last = points.findLast((point) => point.errorPercent !== null);
      if (!last || last.errorPercent === null) return [];
      return [
        {
          testVolts,
          colour: seriesLook(index, colours).colour,
          x: pen.x(last.nominalOhms),
          y: edgeY(pen, last.errorPercent),
        },
      ];
    })
    .sort((a, b) => a.x - b.x || a.y - b.y);
  let previous: { x: number; y: number } | null = null;
  for (const name of names) {
    const isNear: boolean =
      previous !== null && Math.abs(previous.x - name.x) < 60 * pen.ratio && name.y - previous.y < gap;
    const y: number = isNear ? previous!.y + gap : name.y;
    writeWords(pen, formatTestVolts(name.testVolts), name.x + 9 * pen.ratio, y, {
      colour: name.colour,
      family: colours.monoFamily,
      size: 12.5,
      weight: 600,
      baseline: "middle",
      halo: colours.panel,
    });
    previous = { x: name.x, y };
  }
}
