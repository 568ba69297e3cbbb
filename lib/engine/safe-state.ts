import type { BenchDevices } from "@/drivers/bench-devices";
import { DischargePermit } from "@/drivers/discharge-permit";
import { DriverError } from "@/drivers/driver-error";
import type { Bench } from "@/lib/schemas/bench";
import { formatTerminalVolts } from "@/lib/units/format";
import { volts, type Volts } from "@/lib/units/quantities";
import type { Clock } from "./clock";

/** Longest wait for the terminals to fall to the bench's discharged voltage. */
const DISCHARGE_SECONDS = 10;
const POLL_MS = 100;

/**
 * The one way to a safe bench: output off, proven off by the tester's own read-back, and the terminals
 * discharged by the bench's meter, which does not believe the tester.
 */
export class SafeState {
  #permit: DischargePermit | null = null;

  constructor(
    private readonly devices: BenchDevices,
    private readonly bench: Pick<Bench, "name" | "dischargedVolts">,
    private readonly clock: Clock,
  ) {}

  /**
   * Brings the bench to the safe state and hands out the permit to move dials.
   * Throws DriverError when the output or the terminals can't be proven safe.
   */
  async reach(): Promise<DischargePermit> {
    this.revoke();
    await this.devices.tester.switchOff();
    await this.#proveOff();
    const terminalVolts = await this.#waitUntilDischarged();
    this.#permit = DischargePermit.issue(terminalVolts);
    return this.#permit;
  }

  /** Ends the leave to move dials; called before the output is switched on. */
  revoke(): void {
    this.#permit?.revoke();
    this.#permit = null;
  }

  async #proveOff(): Promise<void> {
    const first = await this.devices.tester.readOutput();
    if (!first.on) return;
    await this.devices.tester.switchOff();
    const second = await this.devices.tester.readOutput();
    if (!second.on) return;
    throw new DriverError(
      "wrong-read-back",
      this.devices.tester.name,
      `${this.bench.name}: the tester was told twice to switch its output off and still reports it on, ${formatTerminalVolts(second.terminalVolts)}.`,
      "Treat the terminals as live. Switch the tester off by hand, then look at the bench before you resume.",
    );
  }

  async #waitUntilDischarged(): Promise<Volts> {
    const until = this.clock.monotonicMs() + DISCHARGE_SECONDS * 1000;
    for (;;) {
      const terminalVolts = await this.devices.meter.readVolts();
      if (Math.abs(terminalVolts) <= this.bench.dischargedVolts) return volts(terminalVolts);
      if (this.clock.monotonicMs() >= until) throw this.#notDischarged(terminalVolts);
      await this.clock.sleep(POLL_MS);
    }
  }

  #notDischarged(terminalVolts: Volts): DriverError {
    return new DriverError(
      "not-discharged",
      this.devices.meter.name,
      `${this.bench.name}: the terminals still stand at ${formatTerminalVolts(terminalVolts)} ${DISCHARGE_SECONDS} s after the output was switched off.`,
      "Treat the terminals as live. Discharge them by the bench's own means and look for what feeds them, then resume.",
    );
  }
}
