import type { Device } from "./device";

export interface RoomReading {
  celsius: number;
  humidityPercent: number;
}

/** Temperature and relative humidity at the bench. */
export interface RoomSensor extends Device {
  read(): Promise<RoomReading>;
}
