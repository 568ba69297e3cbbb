import type { StairGroup } from "@/lib/schemas/run";

/** A place on the stair line: a point by its number in the run, and how far through it, 0 to 1. */
export interface StairPlace {
  point: number;
  fraction: number;
}

export function stairLength(groups: readonly StairGroup[]): number {
  return groups.reduce((sum, group) => sum + group.steps.length, 0);
}

/** Number of the group that holds a point, and the number of that group's first point. */
export function groupOf(groups: readonly StairGroup[], point: number): { group: number; first: number } {
  let first = 0;
  for (const [index, group] of groups.entries()) {
    if (point < first + group.steps.length) return { group: index, first };
    first += group.steps.length;
  }
  const last = Math.max(0, groups.length - 1);
  return { group: last, first: first - (groups[last]?.steps.length ?? 0) };
}

/** Where a key takes the cursor; null for a key that moves nothing. */
export function placeAfterKey(key: string, place: StairPlace, groups: readonly StairGroup[]): StairPlace | null {
  const length = stairLength(groups);
  const { group, first } = groupOf(groups, place.point);
  const groupLength = groups[group]?.steps.length ?? 0;
  switch (key) {
    case "ArrowRight":
    case "ArrowUp":
      return place.point + 1 < length ? { point: place.point + 1, fraction: 0 } : { point: length - 1, fraction: 1 };
    case "ArrowLeft":
    case "ArrowDown":
      return { point: Math.max(0, place.fraction > 0 ? place.point : place.point - 1), fraction: 0 };
    case "PageUp":
      return { point: Math.min(length - 1, first + groupLength), fraction: 0 };
    case "PageDown":
      return { point: place.point > first ? first : groupOf(groups, Math.max(0, first - 1)).first, fraction: 0 };
    case "Home":
      return { point: 0, fraction: 0 };
    case "End":
      return { point: length - 1, fraction: 1 };
    default:
      return null;
  }
}
