import type { Amperes, Volts } from "@/lib/units/quantities";
import type { Device } from "./device";

/** The bench's own meter at the terminals: the independent proof that they are discharged. */
export interface Meter extends Device {
  readVolts(): Promise<Volts>;
  readAmperes(): Promise<Amperes>;
}
