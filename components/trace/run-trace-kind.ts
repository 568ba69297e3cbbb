import type { Verdict } from "@/lib/schemas/run-event";
import { formatErrorPercent } from "@/lib/units/format";
import { axis, decimalsOf, timeCeiling } from "@/components/chart/axes";
import type { ChartColours } from "@/components/chart/chart-colours";
import { arrow, ring, strokePath, withPen, writeWords, type Pen } from "@/components/chart/draw";
import type { PlotKind, PlotReader } from "@/components/chart/plot";
import type { RunTracePoint } from "./run-trace";

type Reader = PlotReader<readonly RunTracePoint[]>;

/** Errors over the run's time; the line of each point's limit stands behind its mark. */
export const runTraceKind: PlotKind<readonly RunTracePoint[]> = {
  data: (points) => [points.map((point) => point.elapsedSeconds), points.map((point) => point.errorPercent)],
  options: (read) => ({
    padding: [18, 12, 0, 0],
    legend: { show: false },
    cursor: { show: false },
    scales: {
      x: { time: false, range: () => [0, timeCeiling(read.frame().at(-1)?.elapsedSeconds ?? 0)] },
      y: { range: () => errorRange(read.frame()) },
    },
    axes: [
      axis(
        { colours: read.colours, size: 28, space: 70, values: (_, splits) => splits.map(minutesOf) },
        "bottom",
        false,
      ),
      axis(
        {
          colours: read.colours,
          size: 52,
          space: 40,
          values: (_u, splits, _a, _s, step) => splits.map((value) => formatErrorPercent(value, decimalsOf(step))),
        },
        "left",
        true,
      ),
    ],
    series: [{}, { paths: () => null, points: { show: false } }],
    hooks: {
      draw: [(u) => withPen(u, (pen) => drawPoints(pen, read)), (u) => withPen(u, (pen) => drawUnits(pen, read), true)],
    },
  }),
};

/** All errors and limits, zero among them. */
function errorRange(points: readonly RunTracePoint[]): [number, number] {
  const values = points.flatMap(({ errorPercent, limitPercent }) => [
    errorPercent ?? 0,
    limitPercent ?? 0,
    -(limitPercent ?? 0),
  ]);
  const low = Math.min(-1, ...values);
  const high = Math.max(1, ...values);
  const pad = 0.06 * (high - low);
  return [low - pad, high + pad];
}

function minutesOf(seconds: number): string {
  return String(Math.round((seconds / 60) * 100) / 100);
}

function drawPoints(pen: Pen, read: Reader): void {
  const colours = read.colours();
  strokePath(
    pen,
    [
      [pen.left, pen.y(0)],
      [pen.right, pen.y(0)],
    ],
    { colour: colours.lineStrong, width: 1 },
  );
  for (const point of read.frame()) {
    const x = pen.x(point.elapsedSeconds);
    if (point.limitPercent !== null) {
      strokePath(
        pen,
        [
          [x, pen.y(point.limitPercent)],
          [x, pen.y(-point.limitPercent)],
        ],
        { colour: colours.moss, width: 3, dash: [] },
      );
    }
    if (point.errorPercent !== null) drawMark(pen, x, point.errorPercent, point.verdict, colours);
  }
}

/** Each verdict has a shape of its own: filled, ringed, an arrowhead, a cross. */
function drawMark(pen: Pen, x: number, errorPercent: number, verdict: Verdict, colours: ChartColours): void {
  const y = pen.y(errorPercent);
  const reach = 4 * pen.ratio;
  switch (verdict) {
    case "inside":
      return ring(pen, x, y, 3.2, colours.panel, colours.moss, 1);
    case "doubtful":
      return ring(pen, x, y, 3.6, colours.ochre, colours.panel, 2);
    case "outside":
      return arrow(pen, x, y, errorPercent < 0 ? "down" : "up", colours.brick);
    case "unsettled":
      strokePath(
        pen,
        [
          [x - reach, y - reach],
          [x + reach, y + reach],
        ],
        { colour: colours.plum, width: 2 },
      );
      return strokePath(
        pen,
        [
          [x - reach, y + reach],
          [x + reach, y - reach],
        ],
        { colour: colours.plum, width: 2 },
      );
    case "not-stated":
      return ring(pen, x, y, 3.2, colours.ink2, colours.panel, 1.2);
  }
}

function drawUnits(pen: Pen, read: Reader): void {
  const { ink2, monoFamily } = read.colours();
  const look = { colour: ink2, family: monoFamily, align: "right" } as const;
  writeWords(pen, "%", pen.left - 6 * pen.ratio, pen.top - 6 * pen.ratio, look);
  writeWords(pen, "min", pen.right, pen.bottom + 15 * pen.ratio, look);
}
