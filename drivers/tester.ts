import type { Ohms, Volts } from "@/lib/units/quantities";
import type { Device } from "./device";

export interface TesterReading {
  /** Null when the display is over its range. */
  ohms: Ohms | null;
  /** The reply, letter for letter. */
  raw: string;
}

/** An insulation or resistance tester under test. */
export interface Tester extends Device {
  /** Selects the test voltage and reads it back. Throws DriverError `wrong-read-back` when it did not follow. */
  selectVoltage(testVolts: Volts): Promise<void>;
  /** Switches the output on at the selected voltage. */
  switchOn(): Promise<void>;
  /**
   * Switches the output off. Goes past the port's queue and cancels the exchange under way, so it is on the wire at once.
   * Resolves when the command is sent; `readOutput` proves it.
   */
  switchOff(): Promise<void>;
  readOutput(): Promise<{ on: boolean; terminalVolts: Volts }>;
  readResistance(): Promise<TesterReading>;
}
