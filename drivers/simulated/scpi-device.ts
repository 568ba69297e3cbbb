import type { DeviceRole } from "@/lib/schemas/bench";
import { headerPattern, parseNumber, SCPI_ERRORS, ScpiFault, type ScpiErrorName } from "./scpi-dialect";

/** Answers one line; undefined for a command without an answer. */
type Act = (argument: string | undefined) => string | undefined;

export interface SimulatedDevice {
  readonly role: DeviceRole;
  /** The answer to one line, if any. */
  receiveLine(line: string): string | undefined;
}

const LONGEST_QUEUE = 16;
const HIGHEST_MASK = 255;
/** Bits of the event status register for errors of −1xx (command), −2xx (execution), −3xx (device) and −4xx (query). */
const EVENT_STATUS_BITS: Readonly<Record<number, number>> = { [-1]: 32, [-2]: 16, [-3]: 8, [-4]: 4 };

/** IEEE 488.2 common commands, an error queue and a table of commands. */
export class ScpiDevice implements SimulatedDevice {
  readonly #commands: { pattern: RegExp; act: Act }[] = [];
  readonly #errors: ScpiErrorName[] = [];
  #eventStatus = 0;
  #eventEnable = 0;

  /** `identity` is asked afresh each time, because another tester may be plugged in. */
  constructor(
    readonly role: DeviceRole,
    identity: () => string,
    commands: Readonly<Record<string, Act>>,
  ) {
    const common: Record<string, Act> = {
      "*IDN?": identity,
      "*RST": () => undefined,
      "*CLS": () => this.#clear(),
      "*OPC?": () => "1",
      "*ESR?": () => this.#takeEventStatus(),
      "*ESE": (argument) => this.#setEventEnable(argument),
      "*ESE?": () => String(this.#eventEnable),
      "*STB?": () => String(this.#statusByte()),
      "SYSTem:ERRor[:NEXT]?": () => this.#nextError(),
    };
    for (const [header, act] of Object.entries({ ...common, ...commands })) {
      const pattern = header.startsWith("*")
        ? new RegExp(`^${header.replace(/[*?]/gu, "\\$&")}$`, "iu")
        : headerPattern(header);
      this.#commands.push({ pattern, act });
    }
  }

  receiveLine(line: string): string | undefined {
    const [header = "", ...rest] = line.trim().split(/\s+/u);
    if (header === "") return undefined;
    const command = this.#commands.find(({ pattern }) => pattern.test(header));
    try {
      if (!command) throw new ScpiFault("undefinedHeader");
      return command.act(rest.length > 0 ? rest.join(" ") : undefined);
    } catch (error) {
      if (!(error instanceof ScpiFault)) throw error;
      this.push(error.error);
      return undefined;
    }
  }

  push(error: ScpiErrorName): void {
    const errorClass = Math.trunc(SCPI_ERRORS[error][0] / 100);
    this.#eventStatus |= EVENT_STATUS_BITS[errorClass] ?? 0;
    if (this.#errors.length >= LONGEST_QUEUE) this.#errors[LONGEST_QUEUE - 1] = "queueOverflow";
    else this.#errors.push(error);
  }

  #nextError(): string {
    const error = this.#errors.shift();
    if (!error) return '0,"No error"';
    const [code, text] = SCPI_ERRORS[error];
    return `${code},"${text}"`;
  }

  #clear(): undefined {
    this.#errors.length = 0;
    this.#eventStatus = 0;
  }

  #setEventEnable(argument: string | undefined): undefined {
    const mask = parseNumber(argument, "");
    if (!Number.isInteger(mask) || mask < 0 || mask > HIGHEST_MASK) throw new ScpiFault("dataOutOfRange");
    this.#eventEnable = mask;
  }

  /** Bit 2: the error queue holds something; bit 5: an enabled event has happened. */
  #statusByte(): number {
    const hasEvent = (this.#eventStatus & this.#eventEnable) !== 0;
    return (this.#errors.length > 0 ? 4 : 0) + (hasEvent ? 32 : 0);
  }

  #takeEventStatus(): string {
    const status = this.#eventStatus;
    this.#eventStatus = 0;
    return String(status);
  }
}
