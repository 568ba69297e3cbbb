import type { DecadeBox } from "./decade-box";
import type { DriverError } from "./driver-error";
import type { Meter } from "./meter";
import type { RoomSensor } from "./room-sensor";
import type { Tester } from "./tester";
import type { TracedLine } from "./transport/line-trace";

/** The devices of one bench. */
export interface BenchDevices {
  box: DecadeBox;
  tester: Tester;
  meter: Meter;
  roomSensor: RoomSensor;
  /** Opens every port that is not open; one that can't be does not keep the others closed. Throws DriverError `port-lost` for the first of those. */
  reopen(): Promise<void>;
  /** Calls back when a port is lost; returns a function that stops it. */
  onLost(listener: (error: DriverError) => void): () => void;
  /** The newest lines of each port. */
  traces(): ReadonlyMap<string, readonly TracedLine[]>;
  /** Closes every port. Safe to call twice. */
  close(): Promise<void>;
}
