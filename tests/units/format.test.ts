import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  digitsFor,
  engineeringParts,
  formatDuration,
  formatErrorPercent,
  formatExactDuration,
  formatOhms,
  formatQuantity,
  formatTerminalVolts,
  formatTestVolts,
} from "@/lib/units/format";

/** Thin spaces read as plain ones, so that expectations can be typed. */
function plain(text: string): string {
  return text.replaceAll("\u2009", " ");
}

describe("formatQuantity", () => {
  it.each([
    [10e9, "10.00 GΩ"],
    [999.96, "1.000 kΩ"],
    [0.001234, "1.234 mΩ"],
    [4.7e6, "4.700 MΩ"],
    [1e15, "1000 TΩ"],
    [0, "0 Ω"],
    [-0.32, "\u2212320.0 mΩ"],
  ])("writes %d", (value, expected) => {
    expect(plain(formatQuantity(value, "Ω"))).toBe(expected);
  });

  it("puts a plus before positive values on request", () => {
    expect(plain(formatQuantity(3.2e-10, "A", { digits: 2, signed: true }))).toBe("+320 pA");
  });

  it("sets a thin space between number and unit (ISO 80000-1, 7.1.4)", () => {
    expect(formatQuantity(1e6, "Ω")).toBe("1.000\u2009MΩ");
  });

  it("never shows NaN or an infinity", () => {
    for (const value of [NaN, Infinity, -Infinity]) {
      expect(formatQuantity(value, "Ω")).toBe("–");
      expect(engineeringParts(value, "Ω")).toEqual({ number: "–", unit: "" });
      expect(formatTestVolts(value)).toBe("–");
      expect(formatTerminalVolts(value)).toBe("–");
      expect(formatErrorPercent(value)).toBe("–");
      expect(formatDuration(value)).toBe("–");
      expect(formatExactDuration(value)).toBe("–");
    }
  });

  it("shows between one and three digits before the point over the whole range of prefixes", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-15, max: 9.9e14, noNaN: true }), (value) => {
        expect(engineeringParts(value, "Ω", { digits: 5 }).number).toMatch(/^[1-9]\d{0,2}\.\d+$/u);
      }),
    );
  });
});

describe("digits by resolution", () => {
  it.each([
    [9.6e9, 0.01e9, "9.60 GΩ"],
    [9.6e9, 0.1e9, "9.6 GΩ"],
    [90e9, 5e9, "90 GΩ"],
    [99.94, 0.1, "99.9 Ω"],
    [123456, 1, "123.456 kΩ"],
  ])("%d in steps of %d", (value, step, expected) => {
    expect(plain(formatOhms(value, step))).toBe(expected);
  });

  it("stays between two and six digits", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 1e12, noNaN: true }),
        fc.double({ min: 1e-6, max: 1e12, noNaN: true }),
        (value, step) => {
          expect(digitsFor(value, step)).toBeGreaterThanOrEqual(2);
          expect(digitsFor(value, step)).toBeLessThanOrEqual(6);
        },
      ),
    );
  });
});

describe("voltages, errors and times", () => {
  it("writes test voltages without a prefix", () => {
    expect(plain(formatTestVolts(1000))).toBe("1000 V");
    expect(plain(formatTestVolts(2.25))).toBe("2.3 V");
  });

  it("writes terminal voltages to a tenth below 100 V, and no negative zero", () => {
    expect(plain(formatTerminalVolts(503.12))).toBe("503 V");
    expect(plain(formatTerminalVolts(99.97))).toBe("100 V");
    expect(plain(formatTerminalVolts(11.04))).toBe("11.0 V");
    expect(plain(formatTerminalVolts(-0.04))).toBe("0.0 V");
    expect(plain(formatTerminalVolts(-0.4))).toBe("\u22120.4 V");
  });

  it("writes signed errors, and zero without a sign", () => {
    expect(formatErrorPercent(-3.578)).toBe("\u22123.58");
    expect(formatErrorPercent(0.5)).toBe("+0.50");
    expect(formatErrorPercent(-0.001)).toBe("0.00");
  });

  it("writes durations in the unit that fits", () => {
    expect(plain(formatDuration(48))).toBe("48 s");
    expect(plain(formatDuration(59.7))).toBe("1 min");
    expect(plain(formatDuration(17 * 60))).toBe("17 min");
    expect(plain(formatDuration(3599))).toBe("1 h 00 min");
    expect(plain(formatDuration(-5))).toBe("0 s");
    expect(plain(formatExactDuration(21 * 60 + 40))).toBe("21 min 40 s");
    expect(plain(formatExactDuration(3909))).toBe("1 h 05 min 09 s");
  });
});
