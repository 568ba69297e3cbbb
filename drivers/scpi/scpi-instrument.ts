import type { Device, DeviceIdentity } from "../device";
import { DriverError, isDriverError, isWorthRepeating } from "../driver-error";
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
const QUEUED_ERROR = /^[+-]?\d+,".*"$/u;
const NO_ERROR = /^[+-]?0,/u;
const IDENTITY_FIELDS = 4;

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
    return this.query("*IDN?", (answer) => {
      const fields = answer.split(",").map((field) => field.trim());
      if (fields.length !== IDENTITY_FIELDS) throw this.senseless("*IDN?", answer, "identity of four fields");
      const [maker = "", model = "", serialNumber = "", firmware = ""] = fields;
      return { maker, model, serialNumber, firmware };
    });
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
        if (!isWorthRepeating(error)) throw error;
        // A whole line that makes no sense may be the answer to another question.
        if (isDriverError(error) && error.code === "garbled-reply") this.port.distrust();
        if (tries >= MOST_TRIES) throw error;
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

  /**
   * Sends a setting and reads the error queue. `mayGo` is called right before the line goes and stops it by throwing.
   * Throws DriverError `device-error` when the device refused it.
   */
  protected async set(line: string, mayGo?: () => void): Promise<void> {
    await this.port.send(line, mayGo);
    const answer = await this.query("SYST:ERR?", (text) => this.#queuedError(text));
    if (NO_ERROR.test(answer)) return;
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

  /** An answer in plain characters that is none to the question. */
  protected senseless(line: string, answer: string, wanted: string): DriverError {
    const message = `The ${this.name} answered “${line}” with “${answer}”, which is no ${wanted}.`;
    const cure = "Check its cable and the speed of its port, then resume.";
    return new DriverError("garbled-reply", this.name, message, cure);
  }

  #number(line: string, answer: string): number {
    if (NUMBER.test(answer)) return Number(answer);
    throw this.senseless(line, answer, "number");
  }

  #queuedError(answer: string): string {
    if (QUEUED_ERROR.test(answer)) return answer;
    throw this.senseless("SYST:ERR?", answer, "entry of an error queue");
  }
}
