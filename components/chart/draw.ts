import uPlot from "uplot";

/** Drawing on a chart in the units of its scales. Lengths are CSS pixels. */
export interface Pen {
  u: uPlot;
  ctx: CanvasRenderingContext2D;
  /** Canvas pixels to the CSS pixel. */
  ratio: number;
  x: (value: number) => number;
  y: (value: number) => number;
  left: number;
  right: number;
  top: number;
  bottom: number;
}

/** Runs `act` with the drawing clipped to the plotting area unless `unclipped`. */
export function withPen(u: uPlot, act: (pen: Pen) => void, unclipped = false): void {
  const { ctx, bbox } = u;
  ctx.save();
  if (!unclipped) {
    ctx.beginPath();
    ctx.rect(bbox.left, bbox.top, bbox.width, bbox.height);
    ctx.clip();
  }
  act({
    u,
    ctx,
    ratio: uPlot.pxRatio,
    x: (value) => u.valToPos(value, "x", true),
    y: (value) => u.valToPos(value, "y", true),
    left: bbox.left,
    right: bbox.left + bbox.width,
    top: bbox.top,
    bottom: bbox.top + bbox.height,
  });
  ctx.restore();
}

export interface LineLook {
  colour: string;
  width: number;
  dash?: readonly number[];
}

export function strokePath({ ctx, ratio }: Pen, points: readonly (readonly [number, number])[], look: LineLook): void {
  ctx.beginPath();
  points.forEach(([x, y], index) => (index === 0 ? ctx.moveTo(x, y) : ctx.lineTo(x, y)));
  ctx.strokeStyle = look.colour;
  ctx.lineWidth = look.width * ratio;
  ctx.setLineDash((look.dash ?? []).map((length) => length * ratio));
  ctx.stroke();
  ctx.setLineDash([]);
}

export function fillPath({ ctx }: Pen, points: readonly (readonly [number, number])[], colour: string): void {
  ctx.beginPath();
  points.forEach(([x, y], index) => (index === 0 ? ctx.moveTo(x, y) : ctx.lineTo(x, y)));
  ctx.closePath();
  ctx.fillStyle = colour;
  ctx.fill();
}

export interface WordLook {
  colour: string;
  family: string;
  size?: number;
  weight?: number;
  align?: CanvasTextAlign;
  baseline?: CanvasTextBaseline;
  /** Drawn behind the words, so that lines don't cross them. */
  halo?: string;
}

export function writeWords({ ctx, ratio }: Pen, words: string, x: number, y: number, look: WordLook): void {
  const { colour, family, size = 12, weight = 400, align = "left", baseline = "alphabetic", halo } = look;
  ctx.font = `${weight} ${size * ratio}px ${family}`;
  ctx.textAlign = align;
  ctx.textBaseline = baseline;
  if (halo) {
    ctx.strokeStyle = halo;
    ctx.lineWidth = 3 * ratio;
    ctx.lineJoin = "round";
    ctx.strokeText(words, x, y);
  }
  ctx.fillStyle = colour;
  ctx.fillText(words, x, y);
}

export function ring(
  { ctx, ratio }: Pen,
  x: number,
  y: number,
  radius: number,
  stroke: string,
  fill: string,
  width = 1.6,
): void {
  ctx.beginPath();
  ctx.arc(x, y, radius * ratio, 0, 2 * Math.PI);
  ctx.fillStyle = fill;
  ctx.fill();
  ctx.strokeStyle = stroke;
  ctx.lineWidth = width * ratio;
  ctx.stroke();
}

/** An arrowhead that points the way the error left. */
export function arrow(pen: Pen, x: number, y: number, direction: "up" | "down", colour: string, halfWidth = 5): void {
  const half = halfWidth * pen.ratio;
  const length = 9 * pen.ratio * (direction === "up" ? -1 : 1);
  fillPath(
    pen,
    [
      [x - half, y - length / 2],
      [x + half, y - length / 2],
      [x, y + length / 2],
    ],
    colour,
  );
}
