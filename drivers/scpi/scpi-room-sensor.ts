import type { RoomReading, RoomSensor } from "../room-sensor";
import { ScpiInstrument } from "./scpi-instrument";

/** A room sensor: `MEAS:TEMP?`, `MEAS:HUM?`. */
export class ScpiRoomSensor extends ScpiInstrument implements RoomSensor {
  async read(): Promise<RoomReading> {
    return { celsius: await this.queryNumber("MEAS:TEMP?"), humidityPercent: await this.queryNumber("MEAS:HUM?") };
  }
}
