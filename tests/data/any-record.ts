import fc from "fast-check";
import type { RunEventData, RunEventOf } from "@/lib/schemas/run-event";
import { ohms } from "@/lib/units/quantities";

type ReadingData = RunEventData<"reading.taken">;

const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
const withoutMinusZero = (value: number) => (value === 0 ? 0 : value);

/** Any payload that a reading may have. Minus zero is left out: no display shows it, and SQLite keeps no such whole number. */
export const anyReading: fc.Arbitrary<ReadingData> = fc.record({
  point: fc.nat(500),
  attempt: fc.integer({ min: 1, max: 9 }),
  phase: fc.constantFrom("settling", "averaging"),
  ohms: fc.option(finite.map((value) => ohms(Math.abs(value)))),
  volts: fc.option(finite.map(withoutMinusZero)),
  amperes: fc.option(finite.map(withoutMinusZero)),
  flags: fc.subarray<ReadingData["flags"][number]>(["over-range", "repeated"]),
  raw: fc.string({ unit: "binary", maxLength: 30 }),
});

/** A reading record with an ordinary payload, changed at will. */
export function readingRecord(seq: number, changes: Partial<ReadingData>): RunEventOf<"reading.taken"> {
  const data: ReadingData = {
    ...{ point: 0, attempt: 1, phase: "settling" },
    ...{ ohms: ohms(9.6e9 + seq), volts: 503.1, amperes: 50.4e-9, flags: [], raw: "+9.60E+09,OHM" },
    ...changes,
  };
  return { seq, atMs: 1_790_000_000_000 + seq * 500, elapsedMs: seq * 500, type: "reading.taken", data };
}
