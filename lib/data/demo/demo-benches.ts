import { benchSchema, type Bench } from "@/lib/schemas/bench";
import type { Standard } from "@/lib/schemas/instrument";

const simulatedDevices = [
  { role: "decade-box", port: "sim:box", baudRate: 9600 },
  { role: "tester", port: "sim:tester", baudRate: 9600 },
  { role: "meter", port: "sim:meter", baudRate: 9600 },
  { role: "room-sensor", port: "sim:room", baudRate: 9600 },
] as const;

const warmRoom = { lowestCelsius: 18, highestCelsius: 28, highestHumidityPercent: 70 };
const coldRoom = { lowestCelsius: 4, highestCelsius: 12, highestHumidityPercent: 75 };

const benches = [
  {
    id: "north",
    name: "North bench",
    room: "Room 2",
    standardId: "db-9-1",
    roomLimits: warmRoom,
    simulation: { seed: 11, roomCelsius: 22.8, roomHumidityPercent: 41 },
  },
  {
    id: "window",
    name: "Window bench",
    room: "Room 2",
    standardId: "db-9-2",
    roomLimits: warmRoom,
    simulation: { seed: 12, roomCelsius: 22.9, roomHumidityPercent: 41 },
  },
  {
    id: "cold-room",
    name: "Cold room bench",
    room: "Room 5",
    standardId: "db-3",
    roomLimits: coldRoom,
    simulation: { seed: 13, roomCelsius: 8.1, roomHumidityPercent: 55 },
  },
] as const;

/** The workshop's three benches, all simulated. */
export function demoBenches(standards: readonly Standard[]): Bench[] {
  return benches.map(({ standardId, ...bench }) =>
    benchSchema.parse({
      ...bench,
      ratedVolts: 1500,
      capacitanceFarads: 150e-12,
      dischargedVolts: 30,
      devices: simulatedDevices,
      standard: standards.find(({ id }) => id === standardId),
    }),
  );
}
