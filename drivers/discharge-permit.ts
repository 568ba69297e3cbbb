import type { Volts } from "@/lib/units/quantities";

const issued = Symbol("issued by the safe state");

/**
 * Leave to move dials: the output is off by read-back and the terminals are discharged.
 * Only the safe state makes one, and it revokes it before the output is switched on.
 */
export class DischargePermit {
  readonly #brand = issued;
  #revoked = false;

  private constructor(readonly terminalVolts: Volts) {}

  /** For the safe state alone, after it has proven the output off and the terminals discharged. */
  static issue(terminalVolts: Volts): DischargePermit {
    return new DischargePermit(terminalVolts);
  }

  get isValid(): boolean {
    return this.#brand === issued && !this.#revoked;
  }

  revoke(): void {
    this.#revoked = true;
  }
}
