import { ReadlineParser } from "@serialport/parser-readline";
import type { SerialPort } from "serialport";
import type { Clock } from "@/lib/engine/clock";
import type { DriverError } from "../driver-error";
import { ByteCap } from "./byte-cap";
import { makePort, type PortBinding } from "./port-binding";
import type { PortErrors } from "./port-errors";

export interface SerialLineOptions {
  path: string;
  baudRate: number;
  clock: Clock;
  binding?: PortBinding | undefined;
  errors: PortErrors;
  onLine: (line: string) => void;
  onLost: (error: DriverError) => void;
}

const LONGEST_LINE_BYTES = 256;
const WRITE_MS = 1000;

/** Lines over a serial port: opening, losing and opening again, without any notion of question and answer. */
export class SerialLine {
  readonly #options: SerialLineOptions;
  #port: SerialPort | null = null;
  #opening: Promise<void> | null = null;
  #closing: Promise<void> = Promise.resolve();
  #openings = 0;
  #lastByteAtMs = -Infinity;

  constructor(options: SerialLineOptions) {
    this.#options = options;
  }

  get isOpen(): boolean {
    return this.#port?.isOpen ?? false;
  }

  get openings(): number {
    return this.#openings;
  }

  get lastByteAtMs(): number {
    return this.#lastByteAtMs;
  }

  /** Opens the port unless it is open; two callers open it once. Throws DriverError `port-lost`. */
  open(): Promise<void> {
    if (this.isOpen) return Promise.resolve();
    this.#opening ??= this.#open().finally(() => (this.#opening = null));
    return this.#opening;
  }

  /** Closes the port without telling of a loss. Safe to call twice. */
  async close(): Promise<void> {
    await this.#opening?.catch(() => undefined);
    const port = this.#port;
    this.#port = null;
    if (port) this.#release(port);
    await this.#closing;
  }

  /** Resolves when the machine has taken the line. Throws DriverError `port-lost` or `no-answer`. */
  write(line: string): Promise<void> {
    const { clock, errors } = this.#options;
    return new Promise((resolve, reject) => {
      const port = this.#port;
      if (!port?.isOpen) return reject(errors.lost(null));
      const cancelDeadline = clock.deadline(WRITE_MS, () => reject(errors.notTaken(line, WRITE_MS)));
      port.write(`${line}\n`, "latin1", (error) => {
        cancelDeadline();
        if (!error) return resolve();
        this.#lose(port, error);
        reject(errors.lost(error));
      });
    });
  }

  async #open(): Promise<void> {
    // A port that is still being let go would be found locked.
    if (this.#port) this.#release(this.#port);
    await this.#closing;
    const { path, baudRate, binding, clock, errors, onLine } = this.#options;
    const port = makePort({ path, baudRate, binding });
    port.on("error", (error: Error) => this.#lose(port, error));
    port.on("close", (error: Error | null) => this.#lose(port, error));
    port.on("data", () => (this.#lastByteAtMs = clock.monotonicMs()));
    port
      .pipe(new ByteCap(LONGEST_LINE_BYTES))
      .pipe(new ReadlineParser({ delimiter: "\n", encoding: "latin1" }))
      .on("data", (line: string) => onLine(line.replace(/\r$/u, "")));
    await new Promise<void>((resolve, reject) =>
      port.open((error) => (error ? reject(errors.lost(error)) : resolve())),
    );
    this.#port = port;
    this.#openings += 1;
  }

  #lose(port: SerialPort, cause: Error | null): void {
    if (this.#port !== port) return;
    this.#port = null;
    this.#release(port);
    this.#options.onLost(this.#options.errors.lost(cause));
  }

  #release(port: SerialPort): void {
    if (port.isOpen) this.#closing = new Promise((resolve) => port.close(() => resolve()));
    else if (port.closing) {
      this.#closing = new Promise((resolve) => {
        port.once("close", () => resolve());
        port.once("error", () => resolve());
      });
    }
  }
}
