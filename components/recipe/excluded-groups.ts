import type { ExcludedPoint } from "@/lib/schemas/plan";
import { formatTestVolts } from "@/lib/units/format";
import { listWords, shortOhms } from "./recipe-words";

export interface ExcludedGroup {
  reason: string;
  /** `50 GΩ and 90 GΩ at 50 V`, or `500 MΩ at 50 V and 100 V`. */
  cells: string;
  count: number;
}

/** Points that will not be run, by reason. */
export function excludedGroups(excluded: readonly ExcludedPoint[]): ExcludedGroup[] {
  const groups = groupBy(excluded, ({ reason }) => reason);
  return groups.map((points) => ({ reason: points[0]!.reason, cells: cellsWords(points), count: points.length }));
}

function cellsWords(points: readonly ExcludedPoint[]): string {
  const isOneResistance = points.every(({ nominalOhms }) => nominalOhms === points[0]!.nominalOhms);
  const rows = isOneResistance ? [points] : groupBy(points, ({ testVolts }) => String(testVolts));
  return rows.map(rowWords).join("; ");
}

function rowWords(points: readonly ExcludedPoint[]): string {
  const resistances = [...new Set(points.map(({ nominalOhms }) => shortOhms(nominalOhms)))];
  const voltages = [...new Set(points.map(({ testVolts }) => formatTestVolts(testVolts)))];
  return `${listWords(resistances)} at ${listWords(voltages)}`;
}

/** Parts of a list that share a key, in the order in which the keys appear. */
function groupBy<T>(items: readonly T[], keyOf: (item: T) => string): T[][] {
  const groups = new Map<string, T[]>();
  for (const item of items) groups.set(keyOf(item), [...(groups.get(keyOf(item)) ?? []), item]);
  return [...groups.values()];
}
