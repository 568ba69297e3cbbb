import type { Clock } from "@/lib/engine/clock";
import type { Bench, DeviceRole } from "@/lib/schemas/bench";
import type { Volts } from "@/lib/units/quantities";
import type { BenchDevices } from "./bench-devices";
import { ScpiDecadeBox } from "./scpi/scpi-decade-box";
import type { Recovery } from "./scpi/scpi-instrument";
import { ScpiMeter } from "./scpi/scpi-meter";
import { ScpiRoomSensor } from "./scpi/scpi-room-sensor";
import { ScpiTester } from "./scpi/scpi-tester";
import { LinePort } from "./transport/line-port";
import type { PortBinding } from "./transport/port-binding";

export interface OpenBenchDevicesOptions {
  bench: Bench;
  clock: Clock;
  checkRating: (positions: readonly number[], highestVolts: Volts) => string | null;
  onRecovered: (recovery: Recovery) => void;
  /** The simulated bench's binding; the machine's own ports without it. */
  binding?: PortBinding | undefined;
}

/** Makes the devices of a bench; `reopen` opens their ports. Throws RangeError when the bench lacks a role. */
export function openBenchDevices({
  bench,
  clock,
  checkRating,
  onRecovered,
  binding,
}: OpenBenchDevicesOptions): BenchDevices {
  const ports = new Map<DeviceRole, LinePort>();
  const portOf = (role: DeviceRole, device: string) => {
    const place = bench.devices.find((entry) => entry.role === role);
    if (!place) throw new RangeError(`${bench.name} has no ${device}`);
    const port = new LinePort({ device, path: place.port, baudRate: place.baudRate, clock, binding });
    ports.set(role, port);
    return port;
  };
  const box = new ScpiDecadeBox({
    port: portOf("decade-box", "decade box"),
    record: bench.standard,
    checkRating,
    onRecovered,
  });
  const tester = new ScpiTester(portOf("tester", "tester"), onRecovered);
  const meter = new ScpiMeter(portOf("meter", "meter"), onRecovered);
  const roomSensor = new ScpiRoomSensor(portOf("room-sensor", "room sensor"), onRecovered);
  const all = [...ports.values()];
  return {
    box,
    tester,
    meter,
    roomSensor,
    reopen: async () => {
      for (const port of all) await port.open();
    },
    onLost: (listener) => {
      const stops = all.map((port) => port.onLost(listener));
      return () => stops.forEach((stop) => stop());
    },
    traces: () => new Map(all.map((port) => [port.name, port.trace])),
    close: async () => {
      for (const port of all) await port.close();
    },
  };
}
