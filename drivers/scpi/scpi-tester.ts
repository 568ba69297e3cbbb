import { ohms, volts, type Volts } from "@/lib/units/quantities";
import type { Tester, TesterReading } from "../tester";
import { ScpiInstrument } from "./scpi-instrument";

/** A tester: `SOUR:VOLT`, `OUTP`, `MEAS:RES?`, `MEAS:VOLT?`. */
export class ScpiTester extends ScpiInstrument implements Tester {
  async selectVoltage(testVolts: Volts): Promise<void> {
    await this.set(`SOUR:VOLT ${testVolts}`);
    const found = await this.queryNumber("SOUR:VOLT?");
    if (Math.abs(found - testVolts) > 0.01 * testVolts)
      throw this.wrongReadBack("test voltage", `${testVolts} V`, `${found} V`);
  }

  switchOn(): Promise<void> {
    return this.set("OUTP ON");
  }

  switchOff(): Promise<void> {
    return this.port.sendUrgent("OUTP OFF");
  }

  async readOutput(): Promise<{ on: boolean; terminalVolts: Volts }> {
    const on = await this.queryNumber("OUTP?");
    return { on: on !== 0, terminalVolts: volts(await this.queryNumber("MEAS:VOLT?")) };
  }

  async readResistance(): Promise<TesterReading> {
    const { value, raw } = await this.queryReading("MEAS:RES?");
    return { ohms: value === null ? null : ohms(Math.max(0, value)), raw };
  }
}
