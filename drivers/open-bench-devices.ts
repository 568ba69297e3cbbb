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

const SIMULATED_PATH = "sim:";

export interface OpenBenchDevicesOptions {
  bench: Bench;
  clock: Clock;
  checkRating: (positions: readonly number[], highestVolts: Volts) => string | null;
  onRecovered: (recovery: Recovery) => void;
  /** Where paths that begin with `sim:` lead: the simulated bench's binding. Other paths are the machine's own. */
  binding?: PortBinding | undefined;
}

/** Makes the devices of a bench; `reopen` opens their ports. Throws RangeError when the bench lacks a role or a simulation. */
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
    const isSimulated = place.port.startsWith(SIMULATED_PATH);
    if (isSimulated && !binding) throw new RangeError(`${place.port} of ${bench.name} needs a simulated bench`);
    const { port: path, baudRate } = place;
    const port = new LinePort({ device, path, baudRate, clock, binding: isSimulated ? binding : undefined });
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
      const opened = await Promise.allSettled(all.map((port) => port.open()));
      const failed = opened.find((outcome) => outcome.status === "rejected");
      if (failed) throw failed.reason;
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
