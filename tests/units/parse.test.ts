import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { formatOhms, formatQuantity } from "@/lib/units/format";
import { parseOhms, parseQuantity, parseVolts, splitList } from "@/lib/units/parse";

function valueOf(text: string): number {
  const parsed = parseOhms(text);
  if (!parsed.ok) throw new Error(parsed.message);
  return parsed.value;
}

describe("parseOhms", () => {
  it.each([
    ["2.2G", 2.2e9],
    ["500 kΩ", 500e3],
    ["500 k\u2126", 500e3],
    ["1e9", 1e9],
    ["10 MOhm", 10e6],
    ["10 megohm", 10e6],
    ["1,5 GΩ", 1.5e9],
    ["  90\u2009GΩ ", 90e9],
    ["0.5 m ohms", 0.5e-3],
    [".5k", 500],
    ["5.", 5],
    ["1e3k", 1e6],
    ["4k7", 4700],
    ["4G7Ω", 4.7e9],
    ["2R2", 2.2],
    ["10R", 10],
  ])("reads %s", (text, expected) => {
    expect(valueOf(text)).toBe(expected);
  });

  it("tells milli from mega", () => {
    expect(valueOf("1 mΩ")).toBe(1e-3);
    expect(valueOf("1 MΩ")).toBe(1e6);
  });

  it("carries no binary artefact", () => {
    expect(valueOf("4.7 MΩ")).toBe(4700000);
    expect(valueOf("0.1 k")).toBe(100);
    expect(valueOf("1.1 G")).toBe(1100000000);
  });

  it.each(["", "  ", "abc", "1.2.3", "10 X", "10 constructor", "1 2", "--5", "NaN", "Infinity", "10 V", "Ω", "4k7k"])(
    "refuses “%s” with a message",
    (text) => {
      const parsed = parseOhms(text);
      expect(parsed.ok).toBe(false);
      expect(parsed).toHaveProperty("message", expect.stringMatching(/resistance/u));
    },
  );

  it("refuses zero, negative and overflowing values", () => {
    expect(parseOhms("0")).toEqual({ ok: false, message: "A resistance is more than 0 Ω." });
    expect(parseOhms("\u22125 k")).toEqual({ ok: false, message: "A resistance is more than 0 Ω." });
    expect(parseOhms("1e400")).toEqual({ ok: false, message: "“1e400” is too large." });
  });

  it("reads back whatever formatOhms writes with all its digits", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1e15, noNaN: true }), (value) => {
        expect(valueOf(formatQuantity(value, "Ω", { digits: 17 }))).toBe(value);
      }),
    );
  });

  it("reads back a shortened value within half of its last digit, and to the same text again", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 9e14, noNaN: true }), (value) => {
        const text = formatOhms(value);
        expect(Math.abs(valueOf(text) - value)).toBeLessThanOrEqual(0.5e-3 * value * (1 + 1e-9));
        expect(formatOhms(valueOf(text))).toBe(text);
      }),
    );
  });
});

describe("parseQuantity", () => {
  it("reads signed currents back", () => {
    fc.assert(
      fc.property(fc.double({ min: -1, max: 1, noNaN: true }), (value) => {
        fc.pre(Math.abs(value) > 1e-15);
        const parsed = parseQuantity(formatQuantity(value, "A", { digits: 17 }), ["A"], "a current");
        expect(parsed).toEqual({ ok: true, value });
      }),
    );
  });
});

describe("parseVolts", () => {
  it.each([
    ["500 V", 500],
    ["1 kV", 1000],
    ["2,5 kV", 2500],
    ["50", 50],
    ["250 volts", 250],
  ])("reads %s", (text, expected) => {
    expect(parseVolts(text)).toEqual({ ok: true, value: expected });
  });

  it("refuses what is no test voltage", () => {
    expect(parseVolts("0 V")).toEqual({ ok: false, message: "A test voltage is more than 0 V." });
    expect(parseVolts("high").ok).toBe(false);
  });
});

describe("splitList", () => {
  it("splits at line ends, semicolons, tabs and commas that are followed by a space", () => {
    expect(splitList("100k; 500 kΩ\n1M\t1,5 G, 10 G;;")).toEqual(["100k", "500 kΩ", "1M", "1,5 G", "10 G"]);
    expect(splitList(" \n ")).toEqual([]);
  });
});
