import type { Device, DeviceIdentity } from "../device";
import { DriverError, isWorthRepeating } from "../driver-error";
import type { LinePort } from "../transport/line-port";

export interface Recovery {
  device: string;
  message: string;
  tries: number;
}

/** A question may be asked so often before its silence counts. */
const MOST_TRIES = 3;
const NUMBER = /^[+-]?\d+(?:\.\d+)?(?:E[+-]?\d+)?$/iu;
const OVER_RANGE = 9.9e37;

/** A device that speaks SCPI over one port: questions repeated where harmless, settings checked in its error queue. */
export abstract class ScpiInstrument implements Device {
  constructor(
    protected readonly port: LinePort,
    private readonly onRecovered: (recovery: Recovery) => void,
  ) {}

  get name(): string {
    return this.port.name;
  }

  async identify(): Promise<DeviceIdentity> {
    const [maker = "", model = "", serialNumber = "", firmware = ""] = (
      await this.query("*IDN?", (text) => text)
    ).split(",");
    return { maker, model, serialNumber, firmware };
  }

  close(): Promise<void> {
    return this.port.close();
  }

  /** Asks and reads the answer; asks again after silence or a torn answer. Throws DriverError. */
  protected async query<T>(line: string, read: (answer: string) => T): Promise<T> {
    for (let tries = 1; ; tries += 1) {
      try {
        const value = read(await this.port.ask(line));
        if (tries > 1)
          this.onRecovered({
            device: this.name,
            message: `The ${this.name} did not answer “${line}” properly.`,
            tries,
          });
        return value;
      } catch (error) {
        if (!isWorthRepeating(error) || tries >= MOST_TRIES) throw error;
      }
    }
  }

  protected queryNumber(line: string): Promise<number> {
    return this.query(line, (answer) => this.#number(line, answer));
  }

  /** As queryNumber, but null for infinity (SCPI-1999, volume 1, 7.2.1). */
  protected async queryReading(line: string): Promise<{ value: number | null; raw: string }> {
    return this.query(line, (raw) => {
      const value = this.#number(line, raw);
      return { value: value >= OVER_RANGE ? null : value, raw };
    });
  }

  /** Sends a setting and reads the error queue. Throws DriverError `device-error` when the device refused it. */
  protected async set(line: string): Promise<void> {
    await this.port.send(line);
    const answer = await this.query("SYST:ERR?", (text) => text);
    if (/^[+-]?0,/u.test(answer)) return;
    throw new DriverError(
      "device-error",
      this.name,
      `The ${this.name} refused “${line}”: ${answer}.`,
      "Look at its display and its manual, then resume.",
    );
  }

  protected wrongReadBack(what: string, wanted: string, found: string): DriverError {
    const message = `The ${this.name} was set to ${what} ${wanted} and reads back ${found}.`;
    return new DriverError(
      "wrong-read-back",
      this.name,
      message,
      "Look at the device and its switches before you resume.",
    );
  }

  #number(line: string, answer: string): number {
    if (NUMBER.test(answer)) return Number(answer);
    const message = `The ${this.name} answered “${line}” with “${answer}”, which is no number.`;
    throw new DriverError(
      "garbled-reply",
      this.name,
      message,
      "Check its cable and the speed of its port, then resume.",
    );
  }
}
