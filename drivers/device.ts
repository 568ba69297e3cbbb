/** What a device says of itself (`*IDN?`, IEEE 488.2, 10.14). */
export interface DeviceIdentity {
  maker: string;
  model: string;
  serialNumber: string;
  firmware: string;
}

export interface Device {
  /** Name for messages, for example `decade box on sim:box`. */
  readonly name: string;
  /** Asks the device who it is; also the heartbeat of an idle port. */
  identify(): Promise<DeviceIdentity>;
  close(): Promise<void>;
}
