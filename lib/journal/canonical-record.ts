import type { RunEvent, RunEventOf } from "@/lib/schemas/run-event";

type Reading = RunEventOf<"reading.taken">;

/** A field of a record as it is stored. */
export type StoredField = string | number | null;

/**
 * The fields under which an event is stored and sealed: seq, atMs, elapsedMs, type, payload as canonical JSON.
 * Throws RangeError for a number that is not finite, which JSON would turn into null.
 */
export function eventFields({ seq, atMs, elapsedMs, type, data }: Exclude<RunEvent, Reading>): StoredField[] {
  return [seq, atMs, elapsedMs, type, canonicalJson(data)];
}

/**
 * The fields under which a reading is stored and sealed: seq, atMs, elapsedMs, point, attempt, phase, ohms, volts,
 * amperes, flags joined by commas, raw. Throws RangeError for a number that is not finite.
 */
export function readingFields({ seq, atMs, elapsedMs, data }: Reading): StoredField[] {
  const { point, attempt, phase, ohms, volts, amperes, flags, raw } = data;
  const fields = [seq, atMs, elapsedMs, point, attempt, phase, ohms, volts, amperes, flags.join(","), raw];
  for (const field of fields) if (typeof field === "number") requireFinite(field);
  return fields;
}

/** The text of a record that the hash chain covers. Two records are the same exactly when their texts are. */
export function canonicalText(fields: readonly StoredField[]): string {
  return `${JSON.stringify(fields)}\n`;
}

/** JSON with sorted keys and without white space. Throws RangeError for a number that is not finite. */
export function canonicalJson(value: unknown): string {
  if (typeof value === "number") requireFinite(value);
  if (value === null || typeof value !== "object") return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(",")}]`;
  const entries = Object.entries(value).filter(([, entry]) => entry !== undefined);
  entries.sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${entries.map(([key, entry]) => `${JSON.stringify(key)}:${canonicalJson(entry)}`).join(",")}}`;
}

function requireFinite(value: number): void {
  if (!Number.isFinite(value)) throw new RangeError(`a record holds finite numbers, got ${value}`);
}
