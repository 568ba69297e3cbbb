import type { BenchDevices } from "@/drivers/bench-devices";
import { DischargePermit } from "@/drivers/discharge-permit";
import { openBenchDevices } from "@/drivers/open-bench-devices";
import type { Recovery } from "@/drivers/scpi/scpi-instrument";
import { SimulatedBench } from "@/drivers/simulated/simulated-bench";
import type { Clock } from "@/lib/engine/clock";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import { checkRating } from "@/lib/metrology/ratings";
import type { Bench } from "@/lib/schemas/bench";
import type { Decade, DecadeBoxRecord, TesterPhysics, Unit, UnitModel } from "@/lib/schemas/instrument";
import { amperes, farads, ohms, volts } from "@/lib/units/quantities";

/** 1 December 2026, 08:00 UTC. */
const START_MS = Date.UTC(2026, 11, 1, 8);
const POSITIONS = 10;

export function testDecade(stepOhms: number, changes: Partial<Decade> = {}): Decade {
  return {
    stepOhms: ohms(stepOhms),
    highestPosition: POSITIONS - 1,
    correctionsOhms: Array.from({ length: POSITIONS }, () => 0),
    uncertaintyPercent: 0.1,
    temperatureCoefficientPpmPerKelvin: 0,
    voltageCoefficientPpmPerVolt: 0,
    ratedVolts: volts(1250),
    ratedAmperes: amperes(2e-3),
    ratedWatts: 1,
    ...changes,
  };
}

/** A box of eight decades from 10 GΩ to 1 kΩ; its certificate finds no deviation. */
export function testBox(changes: Partial<DecadeBoxRecord> = {}): DecadeBoxRecord {
  return {
    id: "box",
    kind: "decade-box",
    maker: "Corvane",
    model: "DB-8",
    name: "Corvane DB-8",
    serialNumber: "C8-0001",
    ratedVolts: volts(1250),
    residualOhms: ohms(0),
    referenceCelsius: 23,
    decades: [10e9, 1e9, 100e6, 10e6, 1e6, 100e3, 10e3, 1e3].map((stepOhms) => testDecade(stepOhms)),
    calibration: { certificate: "T-1", calibratedOn: "2026-06-01", dueOn: "2027-06-01" },
    ...changes,
  };
}

export function testModel(changes: Partial<UnitModel> = {}): UnitModel {
  return {
    id: "model",
    maker: "Pellham",
    model: "IR-10",
    testVolts: [50, 100, 250, 500, 1000].map(volts),
    ranges: [
      { toOhms: ohms(4e6), resolutionOhms: ohms(1e3) },
      { toOhms: ohms(4e9), resolutionOhms: ohms(1e6) },
      { toOhms: ohms(100e9), resolutionOhms: ohms(100e6) },
    ],
    accuracy: [
      { testVolts: [], fromOhms: ohms(0), toOhms: ohms(100e9), percentOfReading: 3, digits: 2, percentPerGigaohm: 0.1 },
    ],
    statementEdition: "2025",
    openCircuitFactor: 1.2,
    shortCircuitAmperes: amperes(0.002),
    displayUpdateSeconds: 0.5,
    filterSeconds: 0.3,
    ...changes,
  };
}

/** A tester without error, leakage, offset, overshoot and noise. */
export const idealPhysics: TesterPhysics = {
  seed: 1,
  gainError: 0,
  leakageSiemens: 0,
  offsetAmperes: 0,
  overshoot: 0,
  sourceOhms: 1e-6,
  currentLimitAmperes: 0.002,
  noise: 0,
};

export function testUnit(physics: Partial<TesterPhysics> = {}, model: UnitModel = testModel()): Unit {
  return {
    id: "unit",
    model,
    serialNumber: "P-0001",
    assetNumber: "TW-0001",
    simulation: { ...idealPhysics, ...physics },
  };
}

export function testBench(changes: Partial<Bench> = {}): Bench {
  return {
    id: "bench",
    name: "Test bench",
    room: "Room 1",
    ratedVolts: volts(1500),
    capacitanceFarads: farads(150e-12),
    dischargedVolts: volts(30),
    roomLimits: { lowestCelsius: 18, highestCelsius: 28, highestHumidityPercent: 70 },
    devices: [
      { role: "decade-box", port: "sim:box", baudRate: 9600 },
      { role: "tester", port: "sim:tester", baudRate: 9600 },
      { role: "meter", port: "sim:meter", baudRate: 9600 },
      { role: "room-sensor", port: "sim:room", baudRate: 9600 },
    ],
    standard: testBox(),
    simulation: { seed: 5, roomCelsius: 23, roomHumidityPercent: 40 },
    ...changes,
  };
}

export interface OpenedTestBench {
  bench: Bench;
  clock: Clock;
  simulated: SimulatedBench;
  devices: BenchDevices;
  /** Trouble that a repetition has cured. */
  recoveries: Recovery[];
  /** A permit that vouches for cold terminals, as the safe state gives it. */
  permit(): DischargePermit;
  /** Switches the output off and waits until the terminals are discharged. */
  discharge(): Promise<void>;
  close(): Promise<void>;
}

/** A simulated bench with its ports open and a unit on its terminals, in virtual time unless a clock is given. */
export async function openTestBench(
  options: { clock?: Clock; bench?: Bench; unit?: Unit } = {},
): Promise<OpenedTestBench> {
  const { clock = new VirtualClock({ startMs: START_MS }), bench = testBench(), unit = testUnit() } = options;
  const simulated = new SimulatedBench({ bench, clock });
  simulated.connectUnit(unit);
  const recoveries: Recovery[] = [];
  const devices = openBenchDevices({
    bench,
    clock,
    checkRating: (positions, highestVolts) => checkRating(bench.standard, positions, highestVolts),
    onRecovered: (recovery) => recoveries.push(recovery),
    binding: simulated.binding,
  });
  await devices.reopen();
  return {
    bench,
    clock,
    simulated,
    devices,
    recoveries,
    permit: () => DischargePermit.issue(volts(0)),
    discharge: async () => {
      await devices.tester.switchOff();
      await clock.sleep(3000);
    },
    close: () => devices.close(),
  };
}
