import { seriesBetween, type SeriesName } from "@/lib/planning/series";
import { parseOhms } from "@/lib/units/parse";
import { shortOhms } from "./recipe-words";

/** A section holds no more. */
const MOST_VALUES = 200;

/** The values of a series between two resistances, or what is wrong with the two. */
export function generateSeries(
  series: SeriesName,
  from: string,
  to: string,
): { ok: true; values: number[] } | { ok: false; at: "from" | "to"; message: string } {
  const first = parseOhms(from);
  if (!first.ok) return { ok: false, at: "from", message: first.message };
  const last = parseOhms(to);
  if (!last.ok) return { ok: false, at: "to", message: last.message };
  if (first.value > last.value) {
    return { ok: false, at: "to", message: `The end lies at or above the start, ${shortOhms(first.value)}.` };
  }
  const values = seriesBetween(series, first.value, last.value);
  if (values.length === 0) return { ok: false, at: "to", message: `${series} has no value between the two.` };
  if (values.length > MOST_VALUES) {
    return {
      ok: false,
      at: "to",
      message: `These are ${values.length} values; a section holds at most ${MOST_VALUES}.`,
    };
  }
  return { ok: true, values };
}
