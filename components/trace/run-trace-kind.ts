import type { Verdict } from "@/lib/schemas/run-event";
import { formatErrorPercent } from "@/lib/units/format";
import { axis, decimalsOf, timeCeiling } from "@/components/chart/axes";
import type { ChartColours } from "@/components/chart/chart-colours";
import { arrow, ring, strokePath, withPen, writeWords, type Pen } from "@/components/chart/draw";
import { drawZero, errorY, vertical, writeBeyond, writePercent } from "@/components/chart/percent-marks";
import { percentRange, percentReach } from "@/components/chart/percent-range";
import type { PlotKind, PlotReader } from "@/components/chart/plot";
import type { RunTracePoint } from "./run-trace";

type Reader = PlotReader<readonly RunTracePoint[]>;

/** Errors over the run's time; the line of each point's limit stands behind its mark. */
export const runTraceKind: PlotKind<readonly RunTracePoint[]> = {
  data: (points) => [points.map((point) => point.elapsedSeconds), points.map((point) => point.errorPercent)],
  options: (read) => ({
    padding: [24, 12, 0, 0],
    legend: { show: false },
    cursor: { show: false },
    scales: {
      x: { time: false, range: () => [0, timeCeiling(read.frame().at(-1)?.elapsedSeconds ?? 0)] },
      y: { range: () => percentRange(read.frame()) },
    },
    axes: [
      axis(
        {
          colours: read.colours,
          size: 28,
          space: 70,
          incrs: WHOLE_TIMES,
          values: (_, splits) => splits.map(minutesOf),
        },
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

/** Ticks at whole seconds or minutes. */
const WHOLE_TIMES = [6, 15, 30, 60, 120, 300, 600, 1200, 1800, 3600, 7200, 14400, 36000];

function minutesOf(seconds: number): string {
  return String(Math.round((seconds / 60) * 100) / 100);
}

function drawPoints(pen: Pen, read: Reader): void {
  const colours = read.colours();
  const points = read.frame();
  const reach = percentReach(points);
  for (const { elapsedSeconds, limitPercent } of points) {
    if (limitPercent === null) continue;
    const x = pen.x(elapsedSeconds);
    strokePath(pen, vertical(x, pen.y(limitPercent), pen.y(-limitPercent)), { colour: colours.mossTint, width: 7 });
  }
  drawZero(pen, colours);
  for (const { elapsedSeconds, errorPercent, verdict } of points) {
    if (errorPercent === null) continue;
    const side = errorPercent < 0 ? "down" : "up";
    drawMark(pen, pen.x(elapsedSeconds), errorY(pen, errorPercent, reach), side, verdict, colours);
  }
  const errors = points.flatMap(({ elapsedSeconds, errorPercent }) =>
    errorPercent === null ? [] : [{ x: pen.x(elapsedSeconds), percent: errorPercent }],
  );
  writeBeyond(pen, errors, reach, colours);
}

/** Each verdict has a shape of its own: filled, ringed, an arrowhead, a cross. */
function drawMark(pen: Pen, x: number, y: number, side: "up" | "down", verdict: Verdict, colours: ChartColours): void {
  const reach = 4 * pen.ratio;
  switch (verdict) {
    case "inside":
      return ring(pen, x, y, 3.2, colours.panel, colours.moss, 1);
    case "doubtful":
      return ring(pen, x, y, 3.6, colours.ochre, colours.panel, 2);
    case "outside":
      return arrow(pen, x, y, side, colours.brick);
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
  const colours = read.colours();
  writePercent(pen, colours);
  writeWords(pen, "min", pen.right, pen.bottom + 15 * pen.ratio, {
    colour: colours.ink2,
    family: colours.monoFamily,
    align: "right",
  });
}
