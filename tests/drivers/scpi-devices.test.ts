import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { DriverError } from "@/drivers/driver-error";
import { answering, garbled, silent, slowBy } from "@/drivers/simulated/faults";
import { volts } from "@/lib/units/quantities";
import { openTestBench, testBench, testBox, testUnit, type OpenedTestBench } from "../support/test-bench";

const GIGAOHM = [0, 1, 0, 0, 0, 0, 0, 0];

let bench: OpenedTestBench;

beforeEach(async () => {
  bench = await openTestBench();
});

afterEach(async () => {
  expect(bench.simulated.violations).toEqual([]);
  await bench.close();
});

function setDials(positions: readonly number[] = GIGAOHM, permit = bench.permit()): Promise<void> {
  return bench.devices.box.setDials({ positions, highestVolts: volts(1000), permit });
}

function settingsOf(role: string): string[] {
  return bench.simulated.settings.filter((setting) => setting.role === role).map(({ line }) => line);
}

describe("questions", () => {
  it.each([
    ["silence", silent(2)],
    ["torn answers", garbled(2)],
    ["answers that are no number", answering(/^MEAS:VOLT\?/u, "OVERLOAD", 2)],
  ])("are asked again after %s, and the cure is told", async (_what, fault) => {
    await bench.devices.meter.readVolts();
    bench.simulated.inject("meter", fault);
    expect(Math.abs(await bench.devices.meter.readVolts())).toBeLessThan(1);
    expect(bench.recoveries).toHaveLength(1);
    expect(bench.recoveries[0]).toMatchObject({
      device: "meter on sim:meter",
      message: "The meter on sim:meter did not answer “MEAS:VOLT?” properly.",
    });
    expect(bench.recoveries[0]!.tries).toBeGreaterThan(1);
  });

  it("are given up after three tries, in words", async () => {
    await bench.devices.meter.readVolts();
    bench.simulated.inject("meter", answering(/^MEAS:VOLT\?/u, "OVERLOAD", 99));
    await expect(bench.devices.meter.readVolts()).rejects.toMatchObject({
      code: "garbled-reply",
      message: "The meter on sim:meter answered “MEAS:VOLT?” with “OVERLOAD”, which is no number.",
    });
    const asked = bench.devices
      .traces()
      .get("meter on sim:meter")!
      .filter(({ line }) => line === "MEAS:VOLT?");
    expect(asked).toHaveLength(1 + 3);
    expect(bench.recoveries).toEqual([]);
  });

  it.each(["1.5.2", "1,5", "0x10", "1e", "NaN", "Infinity", "1.0 V", "--1"])("take no number from %s", async (text) => {
    bench.simulated.inject("meter", answering(/^MEAS:VOLT\?/u, text, 99));
    await expect(bench.devices.meter.readVolts()).rejects.toMatchObject({ code: "garbled-reply" });
  });

  it("read a resistance of 9.9E37 or more as over range (SCPI-1999, volume 1, 7.2.1; from memory)", async () => {
    for (const text of ["9.9E37", "+9.90000E+37", "9.91E37"]) {
      bench.simulated.inject("tester", answering(/^MEAS:RES\?/u, text, 1));
      expect(await bench.devices.tester.readResistance()).toEqual({ ohms: null, raw: text });
    }
  });
});

describe("settings", () => {
  it("are not repeated by themselves, and a refusal is told with the device's own words", async () => {
    bench.simulated.inject("tester", answering(/^SYST:ERR\?/u, '-240,"Hardware error"', 1));
    await expect(bench.devices.tester.switchOn()).rejects.toMatchObject({
      code: "device-error",
      message: 'The tester on sim:tester refused “OUTP ON”: -240,"Hardware error".',
    });
    expect(settingsOf("tester")).toEqual(["OUTP ON"]);
    await bench.devices.tester.switchOff();
  });

  it("don't answer for errors that older, torn lines left behind", async () => {
    bench.simulated.socket("tester").device.receiveLine("OU#P ON");
    await bench.devices.tester.selectVoltage(volts(250));
    expect((await bench.devices.tester.readOutput()).on).toBe(false);
  });

  it("that read back otherwise are told with both values: a voltage", async () => {
    bench.simulated.inject("tester", answering(/^SOUR:VOLT\?/u, "+5.0000E+02", 1));
    await expect(bench.devices.tester.selectVoltage(volts(250))).rejects.toMatchObject({
      code: "wrong-read-back",
      message: "The tester on sim:tester was set to test voltage 250 V and reads back 500 V.",
    });
  });

  it("that read back otherwise are told with both values: dials", async () => {
    bench.simulated.inject("decade-box", answering(/^SOUR:RES:POS\?/u, "0,2,0,0,0,0,0,0", 1));
    await expect(setDials()).rejects.toMatchObject({
      code: "wrong-read-back",
      message: "The decade box on sim:box was set to dials 0 1 0 0 0 0 0 0 and reads back 0 2 0 0 0 0 0 0.",
    });
  });

  it.each(["0,1,0,0,0,0,0", "0,1,,0,0,0,0,0", "0,1,0,0,0,0,0,0,", "0,-1,0,0,0,0,0,0", "0,1.5,0,0,0,0,0,0"])(
    "take no dial positions from %s",
    async (text) => {
      bench.simulated.inject("decade-box", answering(/^SOUR:RES:POS\?/u, text, 99));
      await expect(bench.devices.box.readDials()).rejects.toMatchObject({ code: "garbled-reply" });
    },
  );
});

describe("the decade box", () => {
  it("holds a move back whose permit ends while its line waits for its turn", async () => {
    await setDials();
    bench.simulated.inject("decade-box", slowBy(500, 1));
    const permit = bench.permit();
    const reading = bench.devices.box.readDials();
    const moving = setDials([0, 2, 0, 0, 0, 0, 0, 0], permit);
    await bench.clock.sleep(100);
    permit.revoke();
    await expect(moving).rejects.toMatchObject({ code: "refused", message: /not proven to be discharged/u });
    await reading;
    expect(await bench.devices.box.readDials()).toEqual(GIGAOHM);
  });

  it("sends nothing for a move that it refuses", async () => {
    const before = bench.devices.traces().get("decade box on sim:box")!.length;
    const permit = bench.permit();
    permit.revoke();
    await expect(setDials(GIGAOHM, permit)).rejects.toMatchObject({ code: "refused" });
    await expect(setDials([0, 0, 0, 0, 0, 0, 0, 1])).rejects.toMatchObject({ code: "refused" });
    expect(bench.devices.traces().get("decade box on sim:box")!).toHaveLength(before);
  });

  it("does not move another box than the bench's own, and looks again after each opening of the port", async () => {
    await setDials();
    bench.simulated.unplug("decade-box");
    await bench.clock.sleep(1);
    bench.simulated.plugIn("decade-box");
    bench.simulated.inject("decade-box", answering(/^\*IDN\?/u, "Corvane,DB-8,C8-9999,1.0", 1));
    await bench.devices.reopen();
    await expect(setDials([0, 2, 0, 0, 0, 0, 0, 0])).rejects.toMatchObject({
      code: "wrong-identity",
      message: "The decade box on sim:box says that it is DB-8 C8-9999; this bench's standard is DB-8 C8-0001.",
    });
    expect(await bench.devices.box.readDials()).toEqual(GIGAOHM);
    await setDials([0, 2, 0, 0, 0, 0, 0, 0]);
  });

  it("moves hot only when it is deceived about the terminals, and the circuit takes that down", async () => {
    const deceived = await openTestBench();
    await deceived.devices.tester.selectVoltage(volts(50));
    await deceived.devices.tester.switchOn();
    const move = { positions: GIGAOHM, highestVolts: volts(50), permit: deceived.permit() };
    await deceived.devices.box.setDials(move);
    expect(deceived.simulated.violations.map(({ kind }) => kind)).toEqual(["hot-dial-move"]);
    await deceived.close();
  });
});

describe("switching the tester off", () => {
  it("is on the wire at once while an answer is waited for", async () => {
    await setDials();
    await bench.devices.tester.switchOn();
    bench.simulated.inject("tester", slowBy(900, 1));
    const reading = bench.devices.tester.readResistance();
    await bench.clock.sleep(200);
    const beganMs = bench.clock.monotonicMs();
    await bench.devices.tester.switchOff();
    expect(bench.clock.monotonicMs() - beganMs).toBe(0);
    expect(bench.simulated.circuit.state.isOutputOn).toBe(false);
    expect((await bench.devices.tester.readOutput()).on).toBe(false);
    await reading;
  });

  it("keeps a switching-on that was waiting from following it", async () => {
    await setDials();
    bench.simulated.inject("tester", slowBy(500, 1));
    const reading = bench.devices.tester.readResistance();
    const switchingOn = bench.devices.tester.switchOn().catch((error: DriverError) => error.code);
    await bench.devices.tester.switchOff();
    expect(await switchingOn).toBe("refused");
    await reading;
    expect((await bench.devices.tester.readOutput()).on).toBe(false);
    expect(settingsOf("tester")).toEqual(["OUTP OFF"]);
  });

  it("is told as still on by its read-back when the output is stuck", async () => {
    await setDials();
    await bench.devices.tester.switchOn();
    bench.simulated.circuit.wiring.isStuckOn = true;
    await bench.devices.tester.switchOff();
    await bench.clock.sleep(3000);
    const { on, terminalVolts } = await bench.devices.tester.readOutput();
    expect(on).toBe(true);
    expect(terminalVolts).toBeGreaterThan(40);
  });
});

describe("the simulated devices", () => {
  it("answer as the unit that is plugged in", async () => {
    bench.simulated.connectUnit({ ...testUnit(), id: "another", serialNumber: "P-0002" });
    expect(await bench.devices.tester.identify()).toMatchObject({ maker: "Pellham", serialNumber: "P-0002" });
  });

  it("leave the output off when another unit is plugged in or the tester is reset", async () => {
    await setDials();
    await bench.devices.tester.switchOn();
    bench.simulated.socket("tester").device.receiveLine("*RST");
    expect((await bench.devices.tester.readOutput()).on).toBe(false);
  });

  it("refuse a setting of the wrong shape or beyond the dials", () => {
    const { device } = bench.simulated.socket("decade-box");
    const refusals = ["0,1", "0,1,0,0,0,0,0,10", "0,1,0,0,0,0,0,0.5", "0,1,0,0,0,0,0,x"].map((argument) => {
      device.receiveLine(`SOUR:RES:POS ${argument}`);
      return device.receiveLine("SYST:ERR?")!.split(",")[0];
    });
    expect(refusals).toEqual(["-109", "-222", "-222", "-224"]);
    device.receiveLine("SOURce:RESistance:POSition 0,1,2,0,0,0,0,3");
    expect(Number(device.receiveLine("sour:res?"))).toBe(1_200_003_000);
  });

  it("refuse another test voltage while the output is on", async () => {
    await setDials();
    await bench.devices.tester.selectVoltage(volts(250));
    await bench.devices.tester.switchOn();
    await expect(bench.devices.tester.selectVoltage(volts(500))).rejects.toMatchObject({
      code: "device-error",
      message: /-221/u,
    });
    await bench.discharge();
  });

  it("show the same readings to the same seed, and others to another", async () => {
    const readings = async (seed: number) => {
      const opened = await openTestBench({
        bench: testBench({ standard: testBox() }),
        unit: testUnit({ seed, noise: 0.01 }),
      });
      await opened.devices.box.setDials({ positions: GIGAOHM, highestVolts: volts(1000), permit: opened.permit() });
      await opened.devices.tester.switchOn();
      const values: (number | null)[] = [];
      for (let count = 0; count < 20; count += 1) {
        await opened.clock.sleep(500);
        values.push((await opened.devices.tester.readResistance()).ohms);
      }
      await opened.close();
      return values;
    };
    const first = await readings(3);
    expect(await readings(3)).toEqual(first);
    expect(await readings(4)).not.toEqual(first);
  });
});
