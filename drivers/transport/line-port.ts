import { ReadlineParser } from "@serialport/parser-readline";
import type { SerialPort } from "serialport";
import type { Clock } from "@/lib/engine/clock";
import { DriverError } from "../driver-error";
import { ByteCap } from "./byte-cap";
import { LineTrace, type TracedLine } from "./line-trace";
import { makePort, type PortBinding } from "./port-binding";

export interface LinePortOptions {
  /** For messages: `tester`. */
  device: string;
  path: string;
  baudRate: number;
  clock: Clock;
  /** The simulated bench's binding; the machine's own without it. */
  binding?: PortBinding | undefined;
  /** How long an answer may take. */
  answerMs?: number;
}

const LONGEST_LINE_BYTES = 256;
const ANSWER_MS = 1000;
/** A line is quiet when nothing has come for so long. */
const QUIET_MS = 50;
/** Answers to an identity query that are thrown away before the device counts as out of step. */
const MOST_STALE_LINES = 8;
const IDENTITY_QUERY = "*IDN?";
/** Four fields, comma-separated (IEEE 488.2, 10.14). */
const IDENTITY = /^[^,]+,[^,]+,[^,]*,[^,]*$/u;
const TORN = /[^\x20-\x7e]/u;

interface Exchange {
  take(line: string): void;
  fail(error: DriverError): void;
}

/**
 * One line-oriented port: one exchange at a time, each with a deadline of its own.
 *
 * After a time-out or a cancelled exchange a late answer may still come, so the next question waits until the line is
 * quiet and an identity query has been answered: no answer is ever taken for the next question's.
 */
export class LinePort {
  readonly #options: LinePortOptions;
  readonly #trace: LineTrace;
  readonly #lostListeners = new Set<(error: DriverError) => void>();
  #port: SerialPort | null = null;
  #exchange: Exchange | null = null;
  #queue: Promise<unknown> = Promise.resolve();
  #isOutOfStep = false;
  #lastLineAtMs = -Infinity;

  constructor(options: LinePortOptions) {
    this.#options = options;
    this.#trace = new LineTrace(options.clock);
  }

  get name(): string {
    return `${this.#options.device} on ${this.#options.path}`;
  }

  get isOpen(): boolean {
    return this.#port?.isOpen ?? false;
  }

  /** The newest lines sent and received. */
  get trace(): readonly TracedLine[] {
    return this.#trace.lines;
  }

  onLost(listener: (error: DriverError) => void): () => void {
    this.#lostListeners.add(listener);
    return () => this.#lostListeners.delete(listener);
  }

  /** Opens the port unless it is open. Throws DriverError `port-lost`. */
  async open(): Promise<void> {
    if (this.isOpen) return;
    const { path, baudRate, binding } = this.#options;
    const port = makePort({ path, baudRate, binding });
    port.on("error", (error: Error) => this.#lose(port, error));
    port.on("close", (error: Error | null) => this.#lose(port, error));
    const parser = port
      .pipe(new ByteCap(LONGEST_LINE_BYTES))
      .pipe(new ReadlineParser({ delimiter: "\n", encoding: "latin1" }));
    parser.on("data", (line: string) => this.#receive(line.replace(/\r$/u, "")));
    await new Promise<void>((resolve, reject) =>
      port.open((error) => (error ? reject(this.#lostError(error)) : resolve())),
    );
    this.#port = port;
    // Opening may restart a device or meet the tail of an old answer.
    this.#isOutOfStep = true;
  }

  async close(): Promise<void> {
    const port = this.#port;
    this.#port = null;
    this.#exchange?.fail(this.#lostError(null));
    if (port?.isOpen) await new Promise<void>((resolve) => port.close(() => resolve()));
  }

  /** Sends a line and resolves with its answer. Throws DriverError `no-answer`, `garbled-reply` or `port-lost`. */
  ask(line: string): Promise<string> {
    return this.#inTurn(async () => {
      if (this.#isOutOfStep) await this.#getInStep();
      return this.#exchangeOnce(line, () => true);
    });
  }

  /** Sends a line that has no answer. Throws DriverError `port-lost`. */
  send(line: string): Promise<void> {
    return this.#inTurn(() => this.#write(line));
  }

  /** Sends a line past the queue, cancelling the exchange under way. Throws DriverError `port-lost`. */
  async sendUrgent(line: string): Promise<void> {
    const cancelled = this.#exchange;
    const written = this.#write(line);
    if (cancelled) {
      this.#isOutOfStep = true;
      cancelled.fail(
        new DriverError("refused", this.name, `The question to the ${this.name} gave way to “${line}”.`, ""),
      );
    }
    await written;
  }

  #inTurn<T>(act: () => Promise<T>): Promise<T> {
    const done = this.#queue.then(act);
    this.#queue = done.catch(() => undefined);
    return done;
  }

  /** Waits until the line is quiet, then asks who is there and throws away whatever is not that answer. */
  async #getInStep(): Promise<void> {
    const { clock } = this.#options;
    do await clock.sleep(QUIET_MS);
    while (clock.monotonicMs() - this.#lastLineAtMs < QUIET_MS);
    let stale = 0;
    await this.#exchangeOnce(IDENTITY_QUERY, (answer) => IDENTITY.test(answer) || ++stale > MOST_STALE_LINES);
    if (stale > MOST_STALE_LINES) throw this.#garbled(IDENTITY_QUERY, "lines that are no identity");
    this.#isOutOfStep = false;
  }

  /** One question and the first line that `isAnswer` accepts. */
  #exchangeOnce(line: string, isAnswer: (answer: string) => boolean): Promise<string> {
    return new Promise((resolve, reject) => {
      const end = () => {
        cancelDeadline();
        this.#exchange = null;
      };
      const exchange: Exchange = {
        take: (answer) => {
          const isTorn = answer === "" || TORN.test(answer);
          if (!isTorn && !isAnswer(answer)) return;
          if (isTorn && this.#isOutOfStep) return;
          end();
          if (!isTorn) return resolve(answer);
          this.#isOutOfStep = true;
          reject(this.#garbled(line, JSON.stringify(answer.slice(0, 40))));
        },
        fail: (error) => {
          end();
          reject(error);
        },
      };
      const answerMs = this.#options.answerMs ?? ANSWER_MS;
      const cancelDeadline = this.#options.clock.deadline(answerMs, () => {
        this.#isOutOfStep = true;
        exchange.fail(this.#noAnswer(line, answerMs));
      });
      this.#exchange = exchange;
      this.#write(line).catch((error: DriverError) => exchange.fail(error));
    });
  }

  #write(line: string): Promise<void> {
    return new Promise((resolve, reject) => {
      const port = this.#port;
      if (!port?.isOpen) return reject(this.#lostError(null));
      this.#trace.sent(line);
      port.write(`${line}\n`, "latin1", (error) => {
        if (!error) return resolve();
        this.#lose(port, error);
        reject(this.#lostError(error));
      });
    });
  }

  #receive(line: string): void {
    this.#lastLineAtMs = this.#options.clock.monotonicMs();
    this.#trace.received(line);
    this.#exchange?.take(line);
  }

  #lose(port: SerialPort, cause: Error | null): void {
    if (this.#port !== port) return;
    this.#port = null;
    const error = this.#lostError(cause);
    this.#exchange?.fail(error);
    for (const listener of this.#lostListeners) listener(error);
    if (port.isOpen) port.close(() => undefined);
  }

  #lostError(cause: Error | null): DriverError {
    return new DriverError(
      "port-lost",
      this.name,
      `The port ${this.#options.path} of the ${this.#options.device} is gone.`,
      "Check the adapter and its cable, plug it in again, look at the bench, then resume.",
      { cause },
    );
  }

  #noAnswer(line: string, answerMs: number): DriverError {
    const message = `The ${this.name} did not answer “${line}” within ${answerMs} ms.`;
    return new DriverError("no-answer", this.name, message, "Check its power and its cable, then resume.");
  }

  #garbled(line: string, found: string): DriverError {
    const message = `The ${this.name} answered “${line}” with ${found}, which can't be read.`;
    return new DriverError(
      "garbled-reply",
      this.name,
      message,
      "Check its cable and the speed of its port, then resume.",
    );
  }
}
