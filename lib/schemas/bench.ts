import { z } from "zod";
import { faradsSchema, voltsSchema } from "@/lib/units/quantities";
import { standardSchema } from "./instrument";

export const deviceRoleSchema = z.enum(["decade-box", "tester", "meter", "room-sensor"]);
export type DeviceRole = z.infer<typeof deviceRoleSchema>;

/** One device of a bench: its role and the port on which it answers. */
export const benchDeviceSchema = z.object({
  role: deviceRoleSchema,
  /** A path such as `/dev/serial/by-id/…`, or `sim:box` for a simulated device. */
  port: z.string().min(1),
  baudRate: z.int().positive(),
});
export type BenchDevice = z.infer<typeof benchDeviceSchema>;

export const roomLimitsSchema = z.object({
  lowestCelsius: z.number(),
  highestCelsius: z.number(),
  highestHumidityPercent: z.number(),
});

/** A bench: a place with devices, leads and limits of its own. */
export const benchSchema = z.object({
  id: z.string(),
  name: z.string(),
  room: z.string(),
  ratedVolts: voltsSchema,
  /** Leads and box together, seen from the tester's terminals. */
  capacitanceFarads: faradsSchema,
  /** Terminals at or below this voltage count as discharged. */
  dischargedVolts: voltsSchema,
  roomLimits: roomLimitsSchema,
  devices: z.array(benchDeviceSchema),
  standard: standardSchema,
  /** Present on a bench whose devices are simulated. */
  simulation: z.object({ seed: z.int(), roomCelsius: z.number(), roomHumidityPercent: z.number() }).nullable(),
});
export type Bench = z.infer<typeof benchSchema>;

export const roomSchema = z.object({ celsius: z.number(), humidityPercent: z.number().nullable() });
export type Room = z.infer<typeof roomSchema>;

/** `unknown` is treated and shown as dangerous. */
export const outputStateSchema = z.object({
  state: z.enum(["off", "on", "unknown"]),
  /** Voltage at the terminals where it is known, else the selected test voltage. */
  volts: z.number().nullable(),
});
export type OutputState = z.infer<typeof outputStateSchema>;

/** What a bench does at this moment, for the office and the bench page. */
export const benchSnapshotSchema = z.object({
  id: z.string(),
  name: z.string(),
  roomName: z.string(),
  room: roomSchema.nullable(),
  simulated: z.boolean(),
  /** A run that is not over: running, held, faulted or interrupted. */
  activeRunId: z.string().nullable(),
  output: outputStateSchema,
  /** Present when the bench itself needs a person, in words. */
  trouble: z.string().nullable(),
});
export type BenchSnapshot = z.infer<typeof benchSnapshotSchema>;
