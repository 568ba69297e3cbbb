import { SerialPort } from "serialport";

/** What a port is opened with, as serialport hands it to a binding. */
export interface PortSettings {
  path: string;
  baudRate: number;
}

/**
 * An opened port below serialport's stream: the interface of its bindings.
 * A read or write under way fails with `canceled: true` when the port is closed; any other error means it is lost.
 */
export interface BindingPort {
  readonly openOptions: PortSettings;
  isOpen: boolean;
  read(buffer: Buffer, offset: number, length: number): Promise<{ buffer: Buffer; bytesRead: number }>;
  write(bytes: Buffer): Promise<void>;
  close(): Promise<void>;
  update(options: { baudRate: number }): Promise<void>;
  set(flags: object): Promise<void>;
  get(): Promise<{ cts: boolean; dsr: boolean; dcd: boolean }>;
  getBaudRate(): Promise<{ baudRate: number }>;
  flush(): Promise<void>;
  drain(): Promise<void>;
}

/** Where ports come from: the machine's own, or a simulated bench. */
export interface PortBinding {
  list(): Promise<{ path: string }[]>;
  open(settings: PortSettings): Promise<BindingPort>;
}

/** Makes a closed port. serialport takes any binding when it runs; its types know the machine's alone. */
export function makePort(settings: PortSettings & { binding?: PortBinding | undefined }): SerialPort {
  const { binding, path, baudRate } = settings;
  const options = { path, baudRate, autoOpen: false, hupcl: false, ...(binding ? { binding } : {}) };
  return new SerialPort(options as ConstructorParameters<typeof SerialPort>[0]);
}
