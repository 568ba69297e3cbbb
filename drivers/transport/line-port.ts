import { ReadlineParser } from "@serialport/parser-readline";
import type { SerialPort } from "serialport";
import type { Clock } from "@/lib/engine/clock";
import type { DriverError } from "../driver-error";
import { ByteCap } from "./byte-cap";
import { LineTrace, type TracedLine } from "./line-trace";
import { makePort, type PortBinding } from "./port-binding";
import { PortErrors } from "./port-errors";

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
const WRITE_MS = 1000;
/** A line is quiet when nothing has come for so long. */
const QUIET_MS = 50;
/** A line that is not quiet after so long is not one that can be asked. */
const LONGEST_NOISE_MS = 2000;
/** Answers to an identity query that are thrown away before the device counts as out of step. */
const MOST_STALE_LINES = 8;
const CLEAR_STATUS = "*CLS";
const IDENTITY_QUERY = "*IDN?";
/** Four fields, comma-separated (IEEE 488.2, 10.14). */
const IDENTITY = /^[^,]+,[^,]+,[^,]*,[^,]*$/u;
const TORN = /^$|[^\x20-\x7e]/u;

interface Exchange {
  take(line: string): void;
  fail(error: DriverError): void;
}

/**
 * One line-oriented port: one exchange at a time, each with a deadline of its own.
 *
 * After a time-out, a torn answer or a cancelled exchange a late answer may still come, so the next question waits
 * until the line is quiet and an identity query has been answered: no answer is ever taken for the next question's.
 */
export class LinePort {
  readonly #options: LinePortOptions;
  readonly #errors: PortErrors;
  readonly #trace: LineTrace;
  readonly #lostListeners = new Set<(error: DriverError) => void>();
  #port: SerialPort | null = null;
  #opening: Promise<void> | null = null;
  #closing: Promise<void> = Promise.resolve();
  #openings = 0;
  #exchange: Exchange | null = null;
  #queue: Promise<unknown> = Promise.resolve();
  #urgentLines = 0;
  #isOutOfStep = false;
  #lastByteAtMs = -Infinity;

  constructor(options: LinePortOptions) {
    this.#options = options;
    this.#errors = new PortErrors(options.device, options.path);
    this.#trace = new LineTrace(options.clock);
  }

  get name(): string {
    return this.#errors.name;
  }

  get isOpen(): boolean {
    return this.#port?.isOpen ?? false;
  }

  /** How often the port has been opened: what was known of the device before the last time may be wrong now. */
  get openings(): number {
    return this.#openings;
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
  open(): Promise<void> {
    if (this.isOpen) return Promise.resolve();
    this.#opening ??= this.#open().finally(() => (this.#opening = null));
    return this.#opening;
  }

  /** Closes the port; the exchange under way fails. Safe to call twice. */
  async close(): Promise<void> {
    await this.#opening?.catch(() => undefined);
    const port = this.#port;
    this.#port = null;
    this.#exchange?.fail(this.#errors.lost(null));
    if (port) this.#release(port);
    await this.#closing;
  }

  /**
   * Sends a question and resolves with its answer. A question that an urgent line has cancelled is asked again.
   * Throws DriverError `no-answer`, `garbled-reply` or `port-lost`.
   */
  ask(line: string): Promise<string> {
    return this.#inTurn(async () => {
      for (;;) {
        const urgentLines = this.#urgentLines;
        try {
          if (this.#isOutOfStep) await this.#getInStep();
          return await this.#exchangeOnce(line, () => true);
        } catch (error) {
          if (urgentLines === this.#urgentLines) throw error;
        }
      }
    });
  }

  /**
   * Sends a line that has no answer. `mayGo` is called right before it goes and stops it by throwing.
   * Throws DriverError `port-lost`, `no-answer`, and `refused` when an urgent line came first.
   */
  send(line: string, mayGo: () => void = () => undefined): Promise<void> {
    const urgentLines = this.#urgentLines;
    return this.#inTurn(async () => {
      if (urgentLines !== this.#urgentLines) throw this.#errors.gaveWay(line, "an urgent line");
      mayGo();
      await this.#write(line);
    });
  }

  /**
   * Sends a line past the queue: the exchange under way is cancelled, and lines that were waiting don't follow it.
   * Throws DriverError `port-lost` or `no-answer`.
   */
  async sendUrgent(line: string): Promise<void> {
    const cancelled = this.#exchange;
    this.#urgentLines += 1;
    const written = this.#write(line);
    if (cancelled) {
      this.#isOutOfStep = true;
      cancelled.fail(this.#errors.gaveWay("the question under way", line));
    }
    await written;
  }

  /** Marks the last answer as one that can't have been meant: the next question gets in step first. */
  distrust(): void {
    this.#isOutOfStep = true;
  }

  async #open(): Promise<void> {
    await this.#closing;
    const { path, baudRate, binding } = this.#options;
    const port = makePort({ path, baudRate, binding });
    port.on("error", (error: Error) => this.#lose(port, error));
    port.on("close", (error: Error | null) => this.#lose(port, error));
    port.on("data", () => (this.#lastByteAtMs = this.#options.clock.monotonicMs()));
    port
      .pipe(new ByteCap(LONGEST_LINE_BYTES))
      .pipe(new ReadlineParser({ delimiter: "\n", encoding: "latin1" }))
      .on("data", (line: string) => this.#receive(line.replace(/\r$/u, "")));
    await new Promise<void>((resolve, reject) =>
      port.open((error) => (error ? reject(this.#errors.lost(error)) : resolve())),
    );
    this.#port = port;
    this.#openings += 1;
    // Opening may restart a device or meet the tail of an old answer.
    this.#isOutOfStep = true;
  }

  #inTurn<T>(act: () => Promise<T>): Promise<T> {
    const done = this.#queue.then(act);
    this.#queue = done.catch(() => undefined);
    return done;
  }

  /** Waits until the line is quiet, then asks who is there and throws away whatever is not that answer. */
  async #getInStep(): Promise<void> {
    await this.#untilQuiet();
    // Errors of lines that were torn on their way are nobody's now.
    await this.#write(CLEAR_STATUS);
    let stale = 0;
    await this.#exchangeOnce(IDENTITY_QUERY, (answer) => IDENTITY.test(answer) || ++stale > MOST_STALE_LINES);
    if (stale > MOST_STALE_LINES) throw this.#errors.garbled(IDENTITY_QUERY, "lines that are no identity");
    // The answer to an earlier identity query may have stood in for this one's, which then still comes.
    await this.#untilQuiet();
    this.#isOutOfStep = false;
  }

  async #untilQuiet(): Promise<void> {
    const { clock } = this.#options;
    const beganMs = clock.monotonicMs();
    do {
      await clock.sleep(QUIET_MS);
      if (clock.monotonicMs() - beganMs > LONGEST_NOISE_MS) throw this.#errors.neverQuiet(LONGEST_NOISE_MS);
    } while (clock.monotonicMs() - this.#lastByteAtMs < QUIET_MS);
  }

  /** One question and the first line that `isAnswer` accepts. */
  #exchangeOnce(line: string, isAnswer: (answer: string) => boolean): Promise<string> {
    return new Promise((resolve, reject) => {
      const fail = (error: DriverError) => {
        end();
        reject(error);
      };
      const take = (answer: string) => {
        const isTorn = TORN.test(answer);
        if (isTorn ? this.#isOutOfStep : !isAnswer(answer)) return;
        if (isTorn) return failOutOfStep(this.#errors.garbled(line, JSON.stringify(answer.slice(0, 40))));
        end();
        resolve(answer);
      };
      const failOutOfStep = (error: DriverError) => {
        this.#isOutOfStep = true;
        fail(error);
      };
      const answerMs = this.#options.answerMs ?? ANSWER_MS;
      const cancelDeadline = this.#options.clock.deadline(answerMs, () =>
        failOutOfStep(this.#errors.noAnswer(line, answerMs)),
      );
      const exchange: Exchange = { take, fail };
      const end = () => {
        cancelDeadline();
        if (this.#exchange === exchange) this.#exchange = null;
      };
      this.#exchange = exchange;
      this.#write(line).catch(fail);
    });
  }

  #write(line: string): Promise<void> {
    return new Promise((resolve, reject) => {
      const port = this.#port;
      if (!port?.isOpen) return reject(this.#errors.lost(null));
      this.#trace.sent(line);
      const cancelDeadline = this.#options.clock.deadline(WRITE_MS, () =>
        reject(this.#errors.notTaken(line, WRITE_MS)),
      );
      port.write(`${line}\n`, "latin1", (error) => {
        cancelDeadline();
        if (!error) return resolve();
        this.#lose(port, error);
        reject(this.#errors.lost(error));
      });
    });
  }

  #receive(line: string): void {
    this.#trace.received(line);
    this.#exchange?.take(line);
  }

  #lose(port: SerialPort, cause: Error | null): void {
    if (this.#port !== port) return;
    this.#port = null;
    this.#release(port);
    const error = this.#errors.lost(cause);
    this.#exchange?.fail(error);
    for (const listener of this.#lostListeners) listener(error);
  }

  /** Lets the machine's port go; the next opening waits for it, else it would find the port locked. */
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
