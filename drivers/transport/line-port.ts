import type { Clock } from "@/lib/engine/clock";
import type { DriverError } from "../driver-error";
import { LineTrace, type TracedLine } from "./line-trace";
import type { PortBinding } from "./port-binding";
import { PortErrors } from "./port-errors";
import { SerialLine } from "./serial-line";

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

const ANSWER_MS = 1000;
/** A line is quiet when nothing has come for so long. */
const QUIET_MS = 50;
/** A line that is not quiet after so long is not one that can be asked. */
const LONGEST_NOISE_MS = 2000;
/** Late answers that are thrown away before the device counts as one that can't be asked. */
const MOST_STALE_LINES = 8;
/** Numbers for the event status enable register that no other answer looks like; the register takes 0 to 255. */
const TOKENS = { first: 100, last: 255 } as const;
const TORN = /^$|[^\x20-\x7e]/u;

interface Exchange {
  take(line: string): void;
  fail(error: DriverError): void;
}

/**
 * One line-oriented port: one exchange at a time, each with a deadline of its own.
 *
 * After a time-out, a torn answer or a cancelled exchange a late answer may still come. So the next question waits until
 * the line is quiet and the device has given back a fresh number, which it keeps in its event status enable register
 * (`*ESE`, which IEEE 488.2 asks of every device): no answer is ever taken for the next question's.
 */
export class LinePort {
  readonly #clock: Clock;
  readonly #answerMs: number;
  readonly #errors: PortErrors;
  readonly #trace: LineTrace;
  readonly #line: SerialLine;
  readonly #lostListeners = new Set<(error: DriverError) => void>();
  #exchange: Exchange | null = null;
  #queue: Promise<unknown> = Promise.resolve();
  #urgentLines = 0;
  #isOutOfStep = false;
  #token: number = TOKENS.first;

  constructor({ device, path, baudRate, clock, binding, answerMs = ANSWER_MS }: LinePortOptions) {
    this.#clock = clock;
    this.#answerMs = answerMs;
    this.#errors = new PortErrors(device, path);
    this.#trace = new LineTrace(clock);
    this.#line = new SerialLine({
      path,
      baudRate,
      clock,
      binding,
      errors: this.#errors,
      onLine: (line) => this.#receive(line),
      onLost: (error) => this.#lose(error),
    });
  }

  get name(): string {
    return this.#errors.name;
  }

  get isOpen(): boolean {
    return this.#line.isOpen;
  }

  /** How often the port has been opened: what was known of the device before the last time may be wrong now. */
  get openings(): number {
    return this.#line.openings;
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
    await this.#line.open();
    // Opening may restart a device or meet the tail of an old answer.
    this.#isOutOfStep = true;
  }

  /** Closes the port; the exchange under way fails. Safe to call twice. */
  async close(): Promise<void> {
    await this.#line.close();
    this.#exchange?.fail(this.#errors.lost(null));
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
      if (urgentLines !== this.#urgentLines) throw this.#errors.gaveWay(line);
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
      cancelled.fail(this.#errors.gaveWay("the question under way"));
    }
    await written;
  }

  /** Marks the last answer as one that can't have been meant: the next question gets in step first. */
  distrust(): void {
    this.#isOutOfStep = true;
  }

  #inTurn<T>(act: () => Promise<T>): Promise<T> {
    const done = this.#queue.then(act);
    this.#queue = done.catch(() => undefined);
    return done;
  }

  /** Waits until the line is quiet, then has the device repeat a fresh number and throws away whatever comes before it. */
  async #getInStep(): Promise<void> {
    await this.#untilQuiet();
    this.#token = this.#token < TOKENS.last ? this.#token + 1 : TOKENS.first;
    // Errors of lines that were torn on their way are nobody's now.
    await this.#write("*CLS");
    await this.#write(`*ESE ${this.#token}`);
    let stale = 0;
    const isToken = (answer: string) => Number(answer) === this.#token;
    await this.#exchangeOnce("*ESE?", (answer) => isToken(answer) || ++stale > MOST_STALE_LINES);
    if (stale > MOST_STALE_LINES) throw this.#errors.garbled("*ESE?", "answers to other questions");
    this.#isOutOfStep = false;
  }

  async #untilQuiet(): Promise<void> {
    const clock = this.#clock;
    const beganMs = clock.monotonicMs();
    do {
      await clock.sleep(QUIET_MS);
      if (clock.monotonicMs() - beganMs > LONGEST_NOISE_MS) throw this.#errors.neverQuiet(LONGEST_NOISE_MS);
    } while (clock.monotonicMs() - this.#line.lastByteAtMs < QUIET_MS);
  }

  /** One question and the first whole line that `isAnswer` accepts. */
  #exchangeOnce(line: string, isAnswer: (answer: string) => boolean): Promise<string> {
    return new Promise((resolve, reject) => {
      const cancelDeadline = this.#clock.deadline(this.#answerMs, () => {
        this.#isOutOfStep = true;
        fail(this.#errors.noAnswer(line, this.#answerMs));
      });
      const take = (answer: string) => {
        if (TORN.test(answer)) return takeTorn(answer);
        if (!isAnswer(answer)) return;
        end();
        resolve(answer);
      };
      const takeTorn = (answer: string) => {
        // On the way back into step, torn lines are remains of what was.
        if (this.#isOutOfStep) return;
        this.#isOutOfStep = true;
        fail(this.#errors.garbled(line, JSON.stringify(answer.slice(0, 40))));
      };
      const fail = (error: DriverError) => {
        end();
        reject(error);
      };
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
    if (this.isOpen) this.#trace.sent(line);
    return this.#line.write(line);
  }

  #receive(line: string): void {
    this.#trace.received(line);
    this.#exchange?.take(line);
  }

  #lose(error: DriverError): void {
    this.#exchange?.fail(error);
    for (const listener of this.#lostListeners) listener(error);
  }
}
