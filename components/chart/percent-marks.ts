import { formatErrorPercent } from "@/lib/units/format";
import type { ChartColours } from "./chart-colours";
import { strokePath, writeWords, type Pen } from "./draw";
import { held } from "./percent-range";

/** Height of an error on the chart; beyond the reach it stays at the edge. */
export function errorY(pen: Pen, percent: number, reach: number): number {
  return pen.y(held(percent, reach));
}

/** Width that one figure takes, in CSS pixels. */
const FIGURE_WIDTH = 46;

/** Figures of the errors that stand at the edge, the farthest first; one that would cover another is left to the table. */
export function writeBeyond(
  pen: Pen,
  errors: readonly { x: number; percent: number }[],
  reach: number,
  colours: ChartColours,
): void {
  const beyond = errors.filter(({ percent }) => Math.abs(percent) > reach);
  const placed: { x: number; percent: number }[] = [];
  for (const error of beyond.toSorted((a, b) => Math.abs(b.percent) - Math.abs(a.percent))) {
    const { x, percent } = error;
    const isTaken = placed.some(
      (other) => other.percent < 0 === percent < 0 && Math.abs(other.x - x) < FIGURE_WIDTH * pen.ratio,
    );
    if (isTaken) continue;
    placed.push(error);
    const away = (percent < 0 ? 14 : -14) * pen.ratio;
    writeWords(pen, formatErrorPercent(percent, 1), x + 5 * pen.ratio, errorY(pen, percent, reach) + away, {
      colour: colours.ink2,
      family: colours.monoFamily,
      size: 11.5,
      align: "right",
      baseline: "middle",
      halo: colours.panel,
    });
  }
}

export function drawZero(pen: Pen, colours: ChartColours): void {
  const y = pen.y(0);
  strokePath(pen, horizontal(pen, y), { colour: colours.lineStrong, width: 1 });
}

export function horizontal(pen: Pen, y: number): [number, number][] {
  return [
    [pen.left, y],
    [pen.right, y],
  ];
}

export function vertical(x: number, from: number, to: number): [number, number][] {
  return [
    [x, from],
    [x, to],
  ];
}

/** The unit of the axis of errors, above its end. */
export function writePercent(pen: Pen, colours: ChartColours): void {
  writeWords(pen, "%", pen.left - 6 * pen.ratio, pen.top - 12 * pen.ratio, {
    colour: colours.ink2,
    family: colours.monoFamily,
    align: "right",
  });
}
