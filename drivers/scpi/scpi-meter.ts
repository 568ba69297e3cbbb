import { amperes, volts, type Amperes, type Volts } from "@/lib/units/quantities";
import type { Meter } from "../meter";
import { ScpiInstrument } from "./scpi-instrument";

/** The bench's meter: `MEAS:VOLT?`, `MEAS:CURR?`. */
export class ScpiMeter extends ScpiInstrument implements Meter {
  async readVolts(): Promise<Volts> {
    return volts(await this.queryNumber("MEAS:VOLT?"));
  }

  async readAmperes(): Promise<Amperes> {
    return amperes(await this.queryNumber("MEAS:CURR?"));
  }
}
