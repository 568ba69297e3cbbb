import { formatTestVolts } from "@/lib/units/format";
import type { ChartColours } from "@/components/chart/chart-colours";
import { arrow, fillPath, ring, strokePath, writeWords, type LineLook, type Pen } from "@/components/chart/draw";
import { drawZero, errorY, vertical, writeBeyond, writePercent } from "@/components/chart/percent-marks";
import { percentReach } from "@/components/chart/percent-range";
import type { ErrorPoint, ErrorSeries } from "./error-series";

export interface ErrorChartFrame {
  series: readonly ErrorSeries[];
  /** Test voltage whose limits are drawn as the band. */
  limitVolts: number | null;
}

export function allPoints({ series }: ErrorChartFrame): ErrorPoint[] {
  return series.flatMap(({ points }) => points);
}

/** The tolerance band, under the grid. */
export function drawLimits(pen: Pen, frame: ErrorChartFrame, colours: ChartColours): void {
  const points = statedPoints(frame);
  if (points.length === 0) return;
  const upper = points.map((point): [number, number] => [pen.x(point.nominalOhms), pen.y(point.limitPercent)]);
  const lower = points.map((point): [number, number] => [pen.x(point.nominalOhms), pen.y(-point.limitPercent)]);
  fillPath(pen, [...upper, ...lower.toReversed()], colours.mossTint);
}

function statedPoints({ series, limitVolts }: ErrorChartFrame) {
  const points = series.find(({ testVolts }) => testVolts === limitVolts)?.points ?? [];
  return points.flatMap(({ nominalOhms, limitPercent }) =>
    limitPercent === null ? [] : [{ nominalOhms, limitPercent }],
  );
}

export function drawSeries(pen: Pen, frame: ErrorChartFrame, colours: ChartColours): void {
  const { series } = frame;
  const reach = percentReach(allPoints(frame));
  drawZero(pen, colours);
  series.forEach(({ points }, index) => drawLine(pen, points, reach, seriesLook(index, colours)));
  series.forEach(({ points }, index) => {
    for (const point of points) drawPoint(pen, point, reach, seriesLook(index, colours).colour, colours);
  });
  const errors = allPoints(frame).flatMap(({ nominalOhms, errorPercent }) =>
    errorPercent === null ? [] : [{ x: pen.x(nominalOhms), percent: errorPercent }],
  );
  writeBeyond(pen, errors, reach, colours);
  writeLimitName(pen, frame, colours);
  writeNames(pen, series, reach, colours);
  writePercent(pen, colours);
}

/**
 * Lines of the voltages, told apart by dash first. The verdicts' colours are left to the verdicts, so the lines go
 * between stone, water and ink.
 */
function seriesLook(index: number, colours: ChartColours): LineLook {
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

function drawLine(pen: Pen, points: readonly ErrorPoint[], reach: number, look: LineLook): void {
  const path = points.flatMap(({ nominalOhms, errorPercent }): [number, number][] =>
    errorPercent === null ? [] : [[pen.x(nominalOhms), errorY(pen, errorPercent, reach)]],
  );
  strokePath(pen, path, look);
}

function drawPoint(pen: Pen, point: ErrorPoint, reach: number, colour: string, colours: ChartColours): void {
  const { nominalOhms, errorPercent, uncertaintyPercent, verdict } = point;
  if (errorPercent === null) return;
  const x = pen.x(nominalOhms);
  const y = errorY(pen, errorPercent, reach);
  if (uncertaintyPercent !== null) {
    const [low, high] = [errorPercent - uncertaintyPercent, errorPercent + uncertaintyPercent];
    strokePath(pen, vertical(x, errorY(pen, low, reach), errorY(pen, high, reach)), { colour, width: 1 });
  }
  if (verdict === "outside") arrow(pen, x, y, errorPercent < 0 ? "down" : "up", colours.brick);
  else if (verdict === "unsettled") ring(pen, x, y, 3.4, colours.plum, colours.plum);
  else ring(pen, x, y, 2.8, colour, colours.panel);
}

function writeLimitName(pen: Pen, frame: ErrorChartFrame, colours: ChartColours): void {
  const first = statedPoints(frame)[0];
  if (!first || frame.limitVolts === null) return;
  const y = pen.y(first.limitPercent) - 5 * pen.ratio;
  const isRoom = y > pen.top + 12 * pen.ratio;
  const words = `limits at ${formatTestVolts(frame.limitVolts)}`;
  writeWords(pen, words, pen.x(first.nominalOhms) + 4 * pen.ratio, isRoom ? y : pen.top + 14 * pen.ratio, {
    colour: colours.moss,
    family: colours.textFamily,
  });
}

/** Each voltage's name at the end of its line; names that would cover each other are moved apart. */
function writeNames(pen: Pen, series: readonly ErrorSeries[], reach: number, colours: ChartColours): void {
  const names = series
    .flatMap(({ testVolts, points }, index) => {
      const last = points.findLast((point) => point.errorPercent !== null);
      if (!last || last.errorPercent === null) return [];
      const { colour } = seriesLook(index, colours);
      return [{ testVolts, colour, x: pen.x(last.nominalOhms), y: errorY(pen, last.errorPercent, reach) }];
    })
    .sort((a, b) => a.x - b.x || a.y - b.y);
  const placed: { x: number; y: number }[] = [];
  for (const { testVolts, colour, x, y: wanted } of names) {
    const y = freeY(placed, { x, y: wanted }, { width: 60 * pen.ratio, height: 14 * pen.ratio });
    placed.push({ x, y });
    writeWords(pen, formatTestVolts(testVolts), x + 9 * pen.ratio, y, {
      colour,
      family: colours.monoFamily,
      size: 12.5,
      weight: 600,
      baseline: "middle",
      halo: colours.panel,
    });
  }
}

/** The first height from the wanted one down at which a name covers none of those placed. */
function freeY(
  placed: readonly { x: number; y: number }[],
  wanted: { x: number; y: number },
  size: { width: number; height: number },
): number {
  const near = placed.filter(({ x }) => Math.abs(x - wanted.x) < size.width).sort((a, b) => a.y - b.y);
  let { y } = wanted;
  for (const other of near) if (Math.abs(other.y - y) < size.height) y = other.y + size.height;
  return y;
}
