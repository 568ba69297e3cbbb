/** A corner of a polygon in the plane. */
export type Corner = readonly [x: number, y: number];

/** The corners in order round a convex polygon; empty when nothing is left. */
export type Polygon = readonly Corner[];

/**
 * The part of a convex polygon with a·x + b·y <= c.
 * Source: Sutherland and Hodgman, Reentrant polygon clipping, 1974 (from memory).
 */
export function clipPolygon(polygon: Polygon, a: number, b: number, c: number): Polygon {
  if (isWithin(polygon, a, b, c)) return polygon;
  const kept: Corner[] = [];
  let corner = polygon.at(-1)!;
  let excess = a * corner[0] + b * corner[1] - c;
  for (let index = 0; index < polygon.length; index += 1) {
    const next = polygon[index]!;
    const nextExcess = a * next[0] + b * next[1] - c;
    if (excess <= 0 !== nextExcess <= 0) {
      const share = excess / (excess - nextExcess);
      kept.push([corner[0] + share * (next[0] - corner[0]), corner[1] + share * (next[1] - corner[1])]);
    }
    if (nextExcess <= 0) kept.push(next);
    corner = next;
    excess = nextExcess;
  }
  return kept;
}

function isWithin(polygon: Polygon, a: number, b: number, c: number): boolean {
  // An indexed loop: this is asked thousands of times for every sample.
  for (let index = 0; index < polygon.length; index += 1) {
    const corner = polygon[index]!;
    if (a * corner[0] + b * corner[1] > c) return false;
  }
  return true;
}

/** Area and centre of a convex polygon; the centre of a polygon without area is its first corner. */
export function measurePolygon(polygon: Polygon): { area: number; centre: Corner } {
  const first = polygon[0];
  if (!first) return { area: 0, centre: [0, 0] };
  let [twiceArea, momentX, momentY] = [0, 0, 0];
  // Corners are taken relative to the first one: thin polygons far from the origin would lose their area to rounding.
  for (let index = 1; index + 1 < polygon.length; index += 1) {
    const [px, py] = [polygon[index]![0] - first[0], polygon[index]![1] - first[1]];
    const [qx, qy] = [polygon[index + 1]![0] - first[0], polygon[index + 1]![1] - first[1]];
    const cross = px * qy - qx * py;
    twiceArea += cross;
    momentX += (px + qx) * cross;
    momentY += (py + qy) * cross;
  }
  if (twiceArea === 0) return { area: 0, centre: first };
  return {
    area: Math.abs(twiceArea) / 2,
    centre: [first[0] + momentX / (3 * twiceArea), first[1] + momentY / (3 * twiceArea)],
  };
}
