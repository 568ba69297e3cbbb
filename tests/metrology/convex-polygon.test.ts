import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { clipPolygon, measurePolygon, type Polygon } from "@/lib/metrology/convex-polygon";

const square: Polygon = [
  [0, 0],
  [2, 0],
  [2, 2],
  [0, 2],
];

describe("clipPolygon", () => {
  it("leaves a polygon that lies within as it is, and nothing of one that lies beyond", () => {
    expect(clipPolygon(square, 1, 0, 3)).toBe(square);
    expect(clipPolygon(square, 1, 0, -1)).toEqual([]);
  });

  it("cuts a corner off", () => {
    // x + y <= 3 takes a triangle of area 1/2 from a square of 4.
    const { area } = measurePolygon(clipPolygon(square, 1, 1, 3));
    expect(area).toBeCloseTo(3.5, 12);
  });

  it("divides an area into two that sum up to it, wherever the line runs", () => {
    const figure = fc.double({ min: -3, max: 3, noNaN: true });
    fc.assert(
      fc.property(figure, figure, figure, (a, b, c) => {
        const within = measurePolygon(clipPolygon(square, a, b, c)).area;
        const beyond = measurePolygon(clipPolygon(square, -a, -b, -c)).area;
        fc.pre(Math.abs(a) + Math.abs(b) > 1e-6);
        expect(within + beyond).toBeCloseTo(4, 9);
      }),
    );
  });
});

describe("measurePolygon", () => {
  it("finds area and centre", () => {
    expect(measurePolygon(square)).toEqual({ area: 4, centre: [1, 1] });
    const triangle: Polygon = [
      [0, 0],
      [3, 0],
      [0, 3],
    ];
    expect(measurePolygon(triangle)).toEqual({ area: 4.5, centre: [1, 1] });
  });

  it("keeps the area of a sliver far from the origin", () => {
    const sliver: Polygon = [
      [1e6, 1e6],
      [1e6 + 1e-3, 1e6],
      [1e6 + 1e-3, 1e6 + 1e-6],
    ];
    expect(measurePolygon(sliver).area / 0.5e-9).toBeCloseTo(1, 3);
  });

  it("has no area without three corners", () => {
    expect(measurePolygon([])).toEqual({ area: 0, centre: [0, 0] });
    expect(
      measurePolygon([
        [1, 2],
        [3, 4],
      ]),
    ).toEqual({ area: 0, centre: [1, 2] });
  });
});
