import { describe, expect, it } from "vitest";
import { headerPattern, parseBoolean, parseNumber } from "@/drivers/simulated/scpi-dialect";
import { ScpiDevice } from "@/drivers/simulated/scpi-device";

// Rules of IEEE 488.2 and SCPI-1999 as far as the simulated devices keep them; section numbers from memory.

describe("a header", () => {
  it.each([
    "SOURce:VOLTage:LEVel?",
    "SOUR:VOLT:LEV?",
    "source:voltage?",
    "sour:VOLTAGE?",
    ":SOUR:VOLT?",
    "Source:Volt:Level?",
  ])("SOURce:VOLTage[:LEVel]? is met by %s", (sent) => {
    expect(headerPattern("SOURce:VOLTage[:LEVel]?").test(sent)).toBe(true);
  });

  it.each(["SOUR:VOLT", "SOURC:VOLT?", "SOUR:VOLTA?", "SOUR:LEV?", "VOLT?", "SOUR:VOLT:LEV:X?", "XSOUR:VOLT?"])(
    "SOURce:VOLTage[:LEVel]? is not met by %s",
    (sent) => {
      expect(headerPattern("SOURce:VOLTage[:LEVel]?").test(sent)).toBe(false);
    },
  );
});

describe("a number", () => {
  it.each([
    ["250", "V", 250],
    ["+2.5E2", "V", 250],
    [".25kv", "V", 250],
    ["1 MV", "V", 1e-3],
    ["1 MAV", "V", 1e6],
    ["2 UA", "A", 2e-6],
    ["5 MOHM", "OHM", 5e6],
    ["5 MAOHM", "OHM", 5e6],
    ["1.5 GOHM", "OHM", 1.5e9],
    ["1.5e9", "OHM", 1.5e9],
  ])("%s in %s is %d", (text, unit, value) => {
    expect(parseNumber(text, unit)).toBeCloseTo(value, 12);
  });

  it.each(["", undefined])("that is missing is a missing parameter", (text) => {
    expect(() => parseNumber(text, "V")).toThrow("Missing parameter");
  });

  it.each(["fifty", "5 OHM", "5 XV", "1,5", "1e", "--1", "NaN", "Infinity", "5 V V"])("is not %s", (text) => {
    expect(() => parseNumber(text, "V")).toThrow("Illegal parameter value");
  });
});

describe("a boolean", () => {
  it.each([
    ["ON", true],
    ["on", true],
    ["1", true],
    ["OFF", false],
    ["0", false],
  ])("%s is %s", (text, value) => {
    expect(parseBoolean(text)).toBe(value);
  });

  it.each(["2", "yes", "O N"])("is not %s", (text) => {
    expect(() => parseBoolean(text)).toThrow("Illegal parameter value");
  });
});

describe("a device of the dialect", () => {
  function device() {
    let level = 0;
    return new ScpiDevice("meter", () => "Lindqvist,VM-6,M-1,1.0", {
      "SOURce:LEVel": (argument) => {
        level = parseNumber(argument, "V");
        return undefined;
      },
      "SOURce:LEVel?": () => String(level),
    });
  }

  it("answers the common queries", () => {
    const meter = device();
    expect(["*IDN?", "*OPC?", "*ESR?", "*STB?", "SYST:ERR?"].map((line) => meter.receiveLine(line))).toEqual([
      "Lindqvist,VM-6,M-1,1.0",
      "1",
      "0",
      "0",
      '0,"No error"',
    ]);
  });

  it("answers nothing to a command, and nothing to an empty line", () => {
    const meter = device();
    expect(meter.receiveLine("SOUR:LEV 5 MV")).toBeUndefined();
    expect(meter.receiveLine("  ")).toBeUndefined();
    expect(meter.receiveLine("sour:lev?")).toBe("0.005");
    expect(meter.receiveLine("SYSTem:ERRor:NEXT?")).toBe('0,"No error"');
  });

  it("queues errors in the order in which they came and answers nothing to what it does not know", () => {
    const meter = device();
    expect(meter.receiveLine("NONSENSE?")).toBeUndefined();
    meter.receiveLine("SOUR:LEV");
    meter.receiveLine("SOUR:LEV five");
    expect(meter.receiveLine("*STB?")).toBe("4");
    expect([1, 2, 3, 4].map(() => meter.receiveLine("SYST:ERR?"))).toEqual([
      '-113,"Undefined header"',
      '-109,"Missing parameter"',
      '-224,"Illegal parameter value"',
      '0,"No error"',
    ]);
  });

  it("sets the event status bit of the error's class, and clears it when it is read", () => {
    const meter = device();
    meter.receiveLine("SOUR:LEV");
    expect(meter.receiveLine("*ESR?")).toBe("32");
    meter.receiveLine("SOUR:LEV five");
    expect(meter.receiveLine("*ESR?")).toBe("16");
    meter.push("queueOverflow");
    expect(meter.receiveLine("*ESR?")).toBe("8");
    expect(meter.receiveLine("*ESR?")).toBe("0");
  });

  it("keeps a mask of events, and tells in its status byte when one of those has happened", () => {
    const meter = device();
    meter.receiveLine("*ESE 16");
    expect(meter.receiveLine("*ESE?")).toBe("16");
    meter.receiveLine("NONSENSE");
    expect(meter.receiveLine("*STB?")).toBe("4");
    meter.receiveLine("*ESE 256");
    expect(meter.receiveLine("*ESE?")).toBe("16");
    expect(meter.receiveLine("*STB?")).toBe("36");
  });

  it("says that its queue has overflown instead of forgetting without a word", () => {
    const meter = device();
    for (let count = 0; count < 20; count += 1) meter.receiveLine("NONSENSE");
    const errors = Array.from({ length: 17 }, () => meter.receiveLine("SYST:ERR?"));
    expect(errors[14]).toBe('-113,"Undefined header"');
    expect(errors[15]).toBe('-350,"Queue overflow"');
    expect(errors[16]).toBe('0,"No error"');
  });

  it("forgets its errors on *CLS", () => {
    const meter = device();
    meter.receiveLine("NONSENSE");
    meter.receiveLine("*CLS");
    expect(meter.receiveLine("SYST:ERR?")).toBe('0,"No error"');
    expect(meter.receiveLine("*ESR?")).toBe("0");
  });
});
