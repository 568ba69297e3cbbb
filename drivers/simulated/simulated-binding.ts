import type { Clock } from "@/lib/engine/clock";
import type { BindingPort, PortBinding, PortSettings } from "../transport/port-binding";
import type { LineFault } from "./faults";
import type { SimulatedDevice } from "./scpi-device";

/** Time from a line's end to the first byte of its answer. */
const ANSWER_MS = 3;

/** One socket of the simulated bench: a device, the faults on its line, and whether its cable is plugged in. */
export class SimulatedSocket {
  readonly faults: LineFault[] = [];
  port: SimulatedPort | null = null;
  #isPlugged = true;

  constructor(
    readonly device: SimulatedDevice,
    private readonly onLine: (device: SimulatedDevice, line: string) => void,
  ) {}

  get isPlugged(): boolean {
    return this.#isPlugged;
  }

  unplug(): void {
    this.#isPlugged = false;
    this.port?.breakOff();
  }

  plugIn(): void {
    this.#isPlugged = true;
  }

  /** The bytes that answer a line, and how much later than usual; null for none. */
  answer(line: string): { text: string; lateMs: number } | null {
    this.onLine(this.device, line);
    const answer = this.device.receiveLine(line);
    for (const fault of this.faults) {
      const delivery = fault.isSpent ? null : fault.meet(line, answer);
      if (delivery) return delivery.text === null ? null : { text: delivery.text, lateMs: delivery.lateMs };
    }
    return answer === undefined ? null : { text: answer, lateMs: 0 };
  }
}

/** A serialport binding whose ports are the sockets of a simulated bench. Bytes know nothing about devices. */
export class SimulatedBinding implements PortBinding {
  constructor(
    private readonly sockets: ReadonlyMap<string, SimulatedSocket>,
    private readonly clock: Clock,
  ) {}

  async list(): Promise<{ path: string }[]> {
    return [...this.sockets].filter(([, socket]) => socket.isPlugged).map(([path]) => ({ path }));
  }

  async open(options: PortSettings): Promise<SimulatedPort> {
    const socket = this.sockets.get(options.path);
    if (!socket?.isPlugged) throw new Error(`Error: No such file or directory, cannot open ${options.path}`);
    if (socket.port?.isOpen) throw new Error(`Error Resource temporarily unavailable Cannot lock port`);
    socket.port = new SimulatedPort(options, socket, this.clock);
    return socket.port;
  }
}

interface PendingRead {
  buffer: Buffer;
  offset: number;
  length: number;
  resolve: (result: { buffer: Buffer; bytesRead: number }) => void;
  reject: (error: Error) => void;
}

/** One opened port: bytes in, bytes out. */
export class SimulatedPort implements BindingPort {
  readonly openOptions: PortSettings;
  isOpen = true;
  #received = "";
  #outgoing = Buffer.alloc(0);
  #pending: PendingRead | null = null;
  #busyUntilMs = 0;
  readonly #cancels = new Set<() => void>();

  constructor(
    options: PortSettings,
    private readonly socket: SimulatedSocket,
    private readonly clock: Clock,
  ) {
    this.openOptions = options;
  }

  read(buffer: Buffer, offset: number, length: number): Promise<{ buffer: Buffer; bytesRead: number }> {
    return new Promise((resolve, reject) => {
      if (!this.isOpen) return reject(canceled());
      if (!this.socket.isPlugged) return reject(new Error("EIO: i/o error, read"));
      this.#pending = { buffer, offset, length, resolve, reject };
      this.#deliver();
    });
  }

  async write(bytes: Buffer): Promise<void> {
    if (!this.isOpen) throw canceled();
    if (!this.socket.isPlugged) throw new Error("EIO: i/o error, write");
    this.#received += bytes.toString("latin1");
    const lines = this.#received.split("\n");
    this.#received = lines.pop() ?? "";
    for (const line of lines) this.#answer(line.replace(/\r$/u, ""));
  }

  async close(): Promise<void> {
    this.isOpen = false;
    for (const cancel of this.#cancels) cancel();
    this.#cancels.clear();
    this.#fail(canceled());
  }

  /** The cable is pulled: reads under way fail as they do on hardware. */
  breakOff(): void {
    this.#fail(new Error("EIO: i/o error, read"));
  }

  /** Puts bytes on the line that nobody asked for. */
  inject(text: string): void {
    this.#outgoing = Buffer.concat([this.#outgoing, Buffer.from(text, "latin1")]);
    this.#deliver();
  }

  async update(): Promise<void> {}
  async set(): Promise<void> {}
  async drain(): Promise<void> {}

  async flush(): Promise<void> {
    this.#outgoing = Buffer.alloc(0);
  }

  async get() {
    return { cts: true, dsr: true, dcd: true };
  }

  async getBaudRate() {
    return { baudRate: this.openOptions.baudRate };
  }

  #answer(line: string): void {
    const answer = this.socket.answer(line);
    if (!answer) return;
    // A device works on one line after the other, so a late answer holds up the next one.
    const nowMs = this.clock.monotonicMs();
    this.#busyUntilMs = Math.max(this.#busyUntilMs, nowMs) + ANSWER_MS + answer.lateMs;
    const cancel = this.clock.schedule(this.#busyUntilMs - nowMs, () => {
      this.#cancels.delete(cancel);
      this.inject(`${answer.text}\n`);
    });
    this.#cancels.add(cancel);
  }

  #deliver(): void {
    const pending = this.#pending;
    if (!pending || this.#outgoing.length === 0) return;
    this.#pending = null;
    const bytesRead = Math.min(pending.length, this.#outgoing.length);
    this.#outgoing.copy(pending.buffer, pending.offset, 0, bytesRead);
    this.#outgoing = this.#outgoing.subarray(bytesRead);
    pending.resolve({ buffer: pending.buffer, bytesRead });
  }

  #fail(error: Error): void {
    this.#pending?.reject(error);
    this.#pending = null;
  }
}

function canceled(): Error & { canceled: true } {
  return Object.assign(new Error("the port is closed"), { canceled: true as const });
}
