import type { RunEvent } from "@/lib/schemas/run-event";

/**
 * The text of a record that the hash chain covers: stamp, type and payload, with the keys of every object in order.
 * Two records are the same exactly when their texts are.
 */
export function canonicalRecord(record: RunEvent): string {
  return `${record.seq}|${record.atMs}|${record.elapsedMs}|${record.type}|${canonicalJson(record.data)}\n`;
}

/** JSON with sorted keys and without white space. */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value !== "object") return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(",")}]`;
  const entries = Object.entries(value).filter(([, entry]) => entry !== undefined);
  entries.sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${entries.map(([key, entry]) => `${JSON.stringify(key)}:${canonicalJson(entry)}`).join(",")}}`;
}
