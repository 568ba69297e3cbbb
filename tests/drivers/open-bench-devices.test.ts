import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { DriverError } from "@/drivers/driver-error";
import { openBenchDevices } from "@/drivers/open-bench-devices";
import { unpluggedAfter } from "@/drivers/simulated/faults";
import { SimulatedBench, type SimulationMemory } from "@/drivers/simulated/simulated-bench";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import { volts } from "@/lib/units/quantities";
import { openTestBench, testBench, testUnit, type OpenedTestBench } from "../support/test-bench";

let bench: OpenedTestBench;

beforeEach(async () => {
  bench = await openTestBench();
});

afterEach(async () => {
  expect(bench.simulated.violations).toEqual([]);
  await bench.close();
});

describe("the devices of a bench", () => {
  it("tell of a lost port once, with the device's name", async () => {
    const lost: DriverError[] = [];
    const stop = bench.devices.onLost((error) => lost.push(error));
    bench.simulated.unplug("meter");
    await bench.clock.sleep(1);
    expect(lost.map(({ code, device }) => [code, device])).toEqual([["port-lost", "meter on sim:meter"]]);
    stop();
    bench.simulated.unplug("tester");
    await bench.clock.sleep(1);
    expect(lost).toHaveLength(1);
  });

  it("lose a port in the middle of their work", async () => {
    bench.simulated.inject(
      "meter",
      unpluggedAfter(7, () => bench.simulated.unplug("meter")),
    );
    const readings = async () => {
      for (;;) await bench.devices.meter.readVolts();
    };
    await expect(readings()).rejects.toMatchObject({ code: "port-lost" });
    expect(
      bench.devices
        .traces()
        .get("meter on sim:meter")!
        .filter(({ direction }) => direction === "sent"),
    ).toHaveLength(7);
  });

  it("open every port that can be opened, though one can't", async () => {
    for (const role of ["decade-box", "tester"] as const) bench.simulated.unplug(role);
    await bench.clock.sleep(1);
    bench.simulated.plugIn("tester");
    await expect(bench.devices.reopen()).rejects.toMatchObject({ code: "port-lost", device: "decade box on sim:box" });
    await bench.devices.tester.switchOff();
    expect((await bench.devices.tester.readOutput()).on).toBe(false);
    bench.simulated.plugIn("decade-box");
    await bench.devices.reopen();
    expect(await bench.devices.box.readDials()).toHaveLength(8);
  });

  it("can't be opened twice by two owners", async () => {
    const { bench: description, clock, simulated } = bench;
    const second = openBenchDevices({
      bench: description,
      clock,
      checkRating: () => null,
      onRecovered: () => undefined,
      binding: simulated.binding,
    });
    await expect(second.reopen()).rejects.toMatchObject({ code: "port-lost" });
    await bench.devices.meter.readVolts();
  });

  it("are missed by name when the bench lacks one", () => {
    const lacking = testBench({ devices: testBench().devices.filter(({ role }) => role !== "meter") });
    const options = { bench: lacking, clock: bench.clock, checkRating: () => null, onRecovered: () => undefined };
    expect(() => openBenchDevices({ ...options, binding: bench.simulated.binding })).toThrow("Test bench has no meter");
  });

  it("need a simulated bench for simulated paths", () => {
    const options = { bench: testBench(), clock: bench.clock, checkRating: () => null, onRecovered: () => undefined };
    expect(() => openBenchDevices(options)).toThrow("sim:box of Test bench needs a simulated bench");
  });

  it("look for other paths on the machine, on a bench with a simulation too", async () => {
    const devices = testBench().devices.map((place) =>
      place.role === "meter" ? { ...place, port: "/dev/no-such-meter" } : place,
    );
    const mixed = testBench({ devices });
    const simulated = new SimulatedBench({ bench: mixed, clock: bench.clock });
    const opened = openBenchDevices({
      bench: mixed,
      clock: bench.clock,
      checkRating: () => null,
      onRecovered: () => undefined,
      binding: simulated.binding,
    });
    await expect(opened.reopen()).rejects.toMatchObject({
      code: "port-lost",
      message: "The port /dev/no-such-meter of the meter is gone.",
    });
    expect(await opened.box.readDials()).toEqual([9, 9, 9, 9, 9, 9, 9, 9]);
    await opened.close();
  });
});

describe("a simulated bench with a memory", () => {
  it("is found again as hardware would be: dials, voltage, unit, and the output still on", async () => {
    let kept: SimulationMemory | null = null;
    const memory = {
      load: () => kept,
      save: (state: SimulationMemory) => (kept = JSON.parse(JSON.stringify(state)) as SimulationMemory),
    };
    const description = testBench();
    const clock = new VirtualClock({ startMs: 0 });
    const before = new SimulatedBench({ bench: description, clock, memory });
    before.connectUnit(testUnit());
    before.circuit.moveDials([0, 1, 0, 0, 0, 0, 0, 0]);
    before.circuit.selectVoltage(500);
    before.circuit.switchOutput(true);

    const after = new SimulatedBench({ bench: description, clock, memory });
    expect(after.circuit.state).toEqual({ positions: [0, 1, 0, 0, 0, 0, 0, 0], testVolts: 500, isOutputOn: true });
    expect(after.circuit.terminalVolts()).toBeCloseTo(500, 3);
    expect(after.circuit.unit?.model.id).toBe(testUnit().model.id);
    expect(after.violations).toEqual([]);
  });
});

describe("the violation record, through the wires", () => {
  it("stays empty over a hundred points in proper order", async () => {
    for (let point = 0; point < 100; point += 1) {
      const positions = [0, 1 + (point % 9), 0, 0, 0, 0, 0, 0];
      await bench.devices.box.setDials({ positions, highestVolts: volts(1200), permit: bench.permit() });
      await bench.devices.tester.selectVoltage(volts(1000));
      await bench.devices.tester.switchOn();
      await bench.clock.sleep(2000);
      await bench.discharge();
    }
    expect(bench.simulated.circuit.state.positions).toEqual([0, 1, 0, 0, 0, 0, 0, 0]);
  });
});
