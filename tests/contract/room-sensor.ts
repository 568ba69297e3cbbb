import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { RoomSensor } from "@/drivers/room-sensor";

export interface RoomSensorUnderTest {
  roomSensor: RoomSensor;
  /** The room as another instrument finds it. */
  room: { celsius: number; humidityPercent: number };
  close(): Promise<void>;
}

/** What preflight relies on from every room sensor. */
export function describeRoomSensor(name: string, open: () => Promise<RoomSensorUnderTest>): void {
  describe(`room sensor: ${name}`, () => {
    let bench: RoomSensorUnderTest;

    beforeEach(async () => {
      bench = await open();
    });
    afterEach(() => bench.close());

    it("says who it is", async () => {
      expect((await bench.roomSensor.identify()).serialNumber).not.toBe("");
    });

    it("reads temperature and humidity of the room", async () => {
      const { celsius, humidityPercent } = await bench.roomSensor.read();
      expect(Math.abs(celsius - bench.room.celsius)).toBeLessThan(1);
      expect(Math.abs(humidityPercent - bench.room.humidityPercent)).toBeLessThan(5);
    });

    it("can be closed twice", async () => {
      await bench.roomSensor.close();
      await bench.roomSensor.close();
      await expect(bench.roomSensor.read()).rejects.toMatchObject({ name: "DriverError", code: "port-lost" });
    });
  });
}
