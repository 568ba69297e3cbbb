import type { DecadeBox } from "./decade-box";
import type { Meter } from "./meter";
import type { RoomSensor } from "./room-sensor";
import type { Tester } from "./tester";

/** The devices of one bench, opened and ready to be asked. */
export interface BenchDevices {
  box: DecadeBox;
  tester: Tester;
  meter: Meter;
  roomSensor: RoomSensor;
  /** Closes every port. Safe to call twice. */
  close(): Promise<void>;
}
