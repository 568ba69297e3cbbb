import { expect } from "vitest";
import type { Clock } from "@/lib/engine/clock";
import { ScaledClock } from "@/lib/engine/scaled-clock";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import { farads, volts } from "@/lib/units/quantities";
import { openTestBench, testBox, testDecade, testBench, type OpenedTestBench } from "../support/test-bench";
import { describeDecadeBox } from "./decade-box";
import { describeMeter } from "./meter";
import { describeRoomSensor } from "./room-sensor";
import { describeTester } from "./tester";

const SETTLING_MS = 8000;
const GIGAOHM = [0, 1, 0, 0, 0, 0, 0, 0];
const TERAOHM = [1, 0, 0, 0, 0, 0, 0, 0];

const clocks: [string, () => Clock][] = [
  ["virtual time", () => new VirtualClock({ startMs: 0 })],
  ["1000 times real time", () => new ScaledClock(1000)],
];

/** Every contract ends with an empty violation record. */
async function closeClean({ simulated, close }: OpenedTestBench): Promise<void> {
  expect(simulated.violations).toEqual([]);
  await close();
}

async function setDials({ devices, permit }: OpenedTestBench, positions: readonly number[]): Promise<void> {
  await devices.box.setDials({ positions, highestVolts: volts(1000), permit: permit() });
}

for (const [time, makeClock] of clocks) {
  const name = `simulated, in ${time}`;

  describeDecadeBox(name, async () => {
    const opened = await openTestBench({ clock: makeClock() });
    return {
      box: opened.devices.box,
      highestPositions: [9, 9, 9, 9, 9, 9, 9, 9],
      // 1000 V across 250 kΩ: 4 mA, and 3.2 W at the 100 kΩ decade, which is rated 1 W.
      beyondRating: { positions: [0, 0, 0, 0, 0, 2, 5, 0], highestVolts: 1000 },
      close: () => closeClean(opened),
    };
  });

  describeTester(name, async () => {
    const bench = testBench({
      // So little that even a teraohm settles in the time given.
      capacitanceFarads: farads(1e-12),
      standard: testBox({ decades: [1e12, 1e9, 1e8, 1e7, 1e6, 1e5, 1e4, 1e3].map((step) => testDecade(step)) }),
    });
    const opened = await openTestBench({ clock: makeClock(), bench });
    await setDials(opened, GIGAOHM);
    return {
      tester: opened.devices.tester,
      testVolts: [50, 100, 250, 500, 1000],
      absentVolts: 700,
      connectedOhms: 1e9,
      settle: () => opened.clock.sleep(SETTLING_MS),
      connectOverRange: () => setDials(opened, TERAOHM),
      close: () => closeClean(opened),
    };
  });

  describeMeter(name, async () => {
    const opened = await openTestBench({ clock: makeClock() });
    await setDials(opened, GIGAOHM);
    return {
      meter: opened.devices.meter,
      energise: async () => {
        await opened.devices.tester.selectVoltage(volts(500));
        await opened.devices.tester.switchOn();
        await opened.clock.sleep(SETTLING_MS);
        return { volts: 500, amperes: 500e-9 };
      },
      discharge: opened.discharge,
      close: () => closeClean(opened),
    };
  });

  describeRoomSensor(name, async () => {
    const opened = await openTestBench({ clock: makeClock() });
    const { roomCelsius, roomHumidityPercent } = opened.bench.simulation!;
    return {
      roomSensor: opened.devices.roomSensor,
      room: { celsius: roomCelsius, humidityPercent: roomHumidityPercent },
      close: () => closeClean(opened),
    };
  });
}
