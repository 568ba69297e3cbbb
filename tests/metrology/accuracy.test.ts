import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { displayResolutionOhms, firstStatedLimit, statedLimit } from "@/lib/metrology/accuracy";
import { errorFrom, range, row } from "./builders";

const ranges = [range(4e9, 1e6), range(40e9, 1e7), range(200e9, 1e9)];

describe("statedLimit", () => {
  it("adds digits of the display to the per cent of reading: 2 % and 2 digits of 0.01 GΩ at 9.60 GΩ give 0.212 GΩ (computed)", () => {
    const limit = statedLimit([row({ percentOfReading: 2, digits: 2 })], ranges, 500, 9.6e9);
    expect(limit).toEqual({ row: 0, limitOhms: expect.closeTo(0.212e9, 3) });
  });

  it("grows with resistance: 2 % and 0.2 % per gigaohm at 9.60 GΩ give 0.37632 GΩ (computed)", () => {
    const limit = statedLimit([row({ percentOfReading: 2, percentPerGigaohm: 0.2 })], ranges, 500, 9.6e9);
    expect(limit).toEqual({ row: 0, limitOhms: expect.closeTo(0.37632e9, 3) });
  });

  it("speaks only between the stated ends, ends included, and not in a gap", () => {
    const rows = [
      row({ fromOhms: 1e6, toOhms: 1e9, percentOfReading: 2 }),
      row({ fromOhms: 2e9, toOhms: 4e9, percentOfReading: 5 }),
    ];
    expect(statedLimit(rows, ranges, 500, 1e6)).toEqual({ row: 0, limitOhms: 2e4 });
    expect(statedLimit(rows, ranges, 500, 1e9)).toEqual({ row: 0, limitOhms: 2e7 });
    expect(statedLimit(rows, ranges, 500, 2e9)).toEqual({ row: 1, limitOhms: 1e8 });
    for (const ohms of [0, 0.999e6, 1.5e9, 4.001e9]) expect(statedLimit(rows, ranges, 500, ohms)).toBeNull();
  });

  it("takes the first of two rows that meet", () => {
    const rows = [row({ toOhms: 1e9, percentOfReading: 2 }), row({ fromOhms: 1e9, percentOfReading: 5 })];
    expect(statedLimit(rows, ranges, 500, 1e9)?.row).toBe(0);
    expect(statedLimit(rows, ranges, 500, 1.0001e9)?.row).toBe(1);
  });

  it("speaks only of its test voltages", () => {
    const rows = [row({ testVolts: [50, 100], percentOfReading: 10 }), row({ testVolts: [500], percentOfReading: 3 })];
    expect(statedLimit(rows, ranges, 100, 1e9)?.row).toBe(0);
    expect(statedLimit(rows, ranges, 500, 1e9)?.row).toBe(1);
    expect(statedLimit(rows, ranges, 250, 1e9)).toBeNull();
  });

  it("says nothing without rows", () => {
    expect(statedLimit([], ranges, 500, 1e9)).toBeNull();
  });

  it("never falls as the resistance rises within a row", () => {
    const value = fc.double({ min: 0, max: 100e9, noNaN: true });
    const part = fc.double({ min: 0, max: 20, noNaN: true });
    fc.assert(
      fc.property(value, value, part, part, part, (one, other, percentOfReading, digits, percentPerGigaohm) => {
        const rows = [row({ percentOfReading, digits, percentPerGigaohm })];
        const [low, high] = one < other ? [one, other] : [other, one];
        expect(statedLimit(rows, ranges, 500, low)!.limitOhms).toBeLessThanOrEqual(
          statedLimit(rows, ranges, 500, high)!.limitOhms,
        );
      }),
    );
  });

  it("names the input that it cannot use", () => {
    const rows = [row({ percentOfReading: 2 })];
    for (const ohms of [NaN, Infinity, -1]) {
      expect(errorFrom(() => statedLimit(rows, ranges, 500, ohms))).toMatchObject({
        name: "MetrologyError",
        field: "ohms",
      });
    }
    for (const volts of [NaN, 0, -500]) {
      expect(errorFrom(() => statedLimit(rows, ranges, volts, 1e6)).field).toBe("testVolts");
    }
    expect(errorFrom(() => statedLimit([row({ digits: 2 })], [], 500, 1e6)).field).toBe("ranges");
  });
});

describe("firstStatedLimit", () => {
  it("falls back to the connected resistance when the indication lies beyond the statement", () => {
    const rows = [row({ toOhms: 1e9, percentOfReading: 2 })];
    expect(firstStatedLimit(rows, ranges, 500, [1.3e9, 0.99e9])).toEqual({ row: 0, limitOhms: 0.0198e9 });
    expect(firstStatedLimit(rows, ranges, 500, [1.3e9, 1.2e9])).toBeNull();
  });
});

describe("displayResolutionOhms", () => {
  it("coarsens with the range, and keeps the top range's step above it", () => {
    expect(displayResolutionOhms(ranges, 4e9)).toBe(1e6);
    expect(displayResolutionOhms(ranges, 4.0001e9)).toBe(1e7);
    expect(displayResolutionOhms(ranges, 500e9)).toBe(1e9);
  });
});
