import uPlot from "uplot";
import { formatOhms } from "@/lib/units/format";
import { axis, decimalsOf, timeCeiling } from "@/components/chart/axes";
import { fillPath, ring, strokePath, withPen, writeWords, type Pen } from "@/components/chart/draw";
import type { PlotKind, PlotReader } from "@/components/chart/plot";
import { expectedCurve, ohmRange, ohmScale, type PointTraceData } from "./trace-frame";

type Reader = PlotReader<PointTraceData>;

/** The trace of one point: readings as a step line, and around it what they are judged by. */
export const pointTraceKind: PlotKind<PointTraceData> = {
  data: ({ samples }) => [samples.map((sample) => sample.seconds), samples.map((sample) => sample.ohms)],
  options: (read) => ({
    padding: [18, 12, 0, 0],
    legend: { show: false },
    cursor: { show: false },
    scales: {
      x: { time: false, range: () => [0, timeCeiling(read.frame().samples.at(-1)?.seconds ?? 0)] },
      y: { range: () => ohmRange(read.frame()) },
    },
    axes: [
      axis({ colours: read.colours, size: 28, space: 70, values: secondsBeforeEnd }, "bottom", false),
      axis(
        {
          colours: read.colours,
          size: 52,
          space: 44,
          values: (_u, splits, _a, _s, step) => ohmTicks(read, splits, step),
        },
        "left",
        true,
      ),
    ],
    series: [
      {},
      {
        stroke: () => read.colours().water,
        width: 2.2,
        paths: uPlot.paths.stepped!({ align: 1 }),
        points: { show: false },
        spanGaps: false,
      },
    ],
    hooks: {
      drawClear: [(u) => withPen(u, (pen) => drawGround(pen, read))],
      draw: [(u) => withPen(u, (pen) => drawMarks(pen, read)), (u) => withPen(u, (pen) => drawUnits(pen, read), true)],
    },
  }),
};

function ohmTicks(read: Reader, splits: readonly number[], step: number): string[] {
  const { factor } = ohmScale(read.frame());
  return splits.map((ohms) => (ohms / factor).toFixed(decimalsOf(step / factor)));
}

/** Tolerance band and watching window, under the grid. */
function drawGround(pen: Pen, read: Reader): void {
  const { standardOhms, limitOhms, windowFromSeconds, samples } = read.frame();
  const colours = read.colours();
  if (standardOhms !== null && limitOhms !== null) {
    const [top, bottom] = [pen.y(standardOhms + limitOhms), pen.y(standardOhms - limitOhms)];
    fillPath(pen, box(pen.left, top, pen.right, bottom), colours.mossTint);
  }
  const last = samples.at(-1);
  if (windowFromSeconds === null || !last || last.phase !== "settling") return;
  pen.ctx.globalAlpha = 0.1;
  fillPath(pen, box(pen.x(windowFromSeconds), pen.top, pen.x(last.seconds), pen.bottom), colours.water);
  pen.ctx.globalAlpha = 1;
}

function box(left: number, top: number, right: number, bottom: number): [number, number][] {
  return [
    [left, top],
    [right, top],
    [right, bottom],
    [left, bottom],
  ];
}

function drawMarks(pen: Pen, read: Reader): void {
  drawStandard(pen, read);
  drawExpected(pen, read);
  drawWindowWord(pen, read);
  const { samples } = read.frame();
  const colours = read.colours();
  for (const { seconds, ohms, phase } of samples) {
    if (phase === "averaging" && ohms !== null)
      ring(pen, pen.x(seconds), pen.y(ohms), 3.4, colours.water, colours.panel);
  }
  const last = samples.at(-1);
  if (last && last.ohms !== null) ring(pen, pen.x(last.seconds), pen.y(last.ohms), 4.5, colours.water, colours.water);
}

function drawStandard(pen: Pen, read: Reader): void {
  const { standardOhms } = read.frame();
  if (standardOhms === null) return;
  const { moss, textFamily } = read.colours();
  const y = pen.y(standardOhms);
  strokePath(
    pen,
    [
      [pen.left, y],
      [pen.right, y],
    ],
    { colour: moss, width: 1, dash: [2, 3] },
  );
  writeWords(
    pen,
    `standard ${formatOhms(standardOhms)}`,
    pen.right - 2 * pen.ratio,
    y + (isFalling(read.frame()) ? 14 : -5) * pen.ratio,
    {
      colour: moss,
      family: textFamily,
      align: "right",
    },
  );
}

function drawExpected(pen: Pen, read: Reader): void {
  const frame = read.frame();
  const { expectedOhms, samples } = frame;
  if (expectedOhms === null || samples.at(-1)?.phase !== "settling") return;
  const { ink2, ink3, textFamily } = read.colours();
  const until = pen.u.scales.x!.max ?? 0;
  const curve = expectedCurve(frame, until).map(([seconds, ohms]): [number, number] => [pen.x(seconds), pen.y(ohms)]);
  strokePath(pen, curve, { colour: ink3, width: 1.2, dash: [5, 4] });
  writeWords(
    pen,
    `expected to end at ${formatOhms(expectedOhms, frame.resolutionOhms)}`,
    pen.right - 2 * pen.ratio,
    expectedWordsY(pen, frame, curve),
    {
      colour: ink2,
      family: textFamily,
      align: "right",
    },
  );
}

/** Below a rising trace, above a falling one: where nothing else is drawn. */
function expectedWordsY(pen: Pen, frame: PointTraceData, curve: readonly (readonly [number, number])[]): number {
  const trace = frame.samples.flatMap(({ seconds, ohms }) => (ohms === null ? [] : [[pen.x(seconds), pen.y(ohms)]]));
  const near = [...curve, ...trace].filter(([x]) => x! > pen.right - 190 * pen.ratio).map(([, y]) => y!);
  return isFalling(frame)
    ? Math.max(pen.top + 12 * pen.ratio, Math.min(...near) - 8 * pen.ratio)
    : Math.min(pen.bottom - 22 * pen.ratio, Math.max(...near) + 18 * pen.ratio);
}

/** Whether the display comes down to the value that it is heading for. */
function isFalling({ samples, expectedOhms }: PointTraceData): boolean {
  const last = samples.at(-1)?.ohms ?? null;
  return last !== null && expectedOhms !== null && last > expectedOhms;
}

function drawWindowWord(pen: Pen, read: Reader): void {
  const { windowFromSeconds, samples } = read.frame();
  const last = samples.at(-1);
  if (windowFromSeconds === null || !last || last.phase !== "settling") return;
  const [from, to] = [pen.x(windowFromSeconds), pen.x(last.seconds)];
  if (to - from < 52 * pen.ratio) return;
  writeWords(pen, "watching", (from + to) / 2, pen.bottom - 6 * pen.ratio, {
    colour: read.colours().water,
    family: read.colours().textFamily,
    size: 11.5,
    align: "center",
  });
}

/** The figures of the time axis; its end belongs to the unit. */
function secondsBeforeEnd(plot: uPlot, splits: number[]): string[] {
  return splits.map((second) => (second === plot.scales.x?.max ? "" : String(second)));
}

/** The unit of each axis at its end. */
function drawUnits(pen: Pen, read: Reader): void {
  const { ink2, monoFamily } = read.colours();
  const look = { colour: ink2, family: monoFamily, align: "right" } as const;
  writeWords(pen, ohmScale(read.frame()).unit, pen.left - 6 * pen.ratio, pen.top - 6 * pen.ratio, look);
  writeWords(pen, "s", pen.right, pen.bottom + 15 * pen.ratio, look);
}
