import type { Volts } from "@/lib/units/quantities";
import type { Device } from "./device";
import type { DischargePermit } from "./discharge-permit";

export interface DialMove {
  /** Positions from the heaviest decade to the lightest. */
  positions: readonly number[];
  /** Highest voltage that will stand across the box at this setting. */
  highestVolts: Volts;
  permit: DischargePermit;
}

/** A programmable decade resistance box. */
export interface DecadeBox extends Device {
  /**
   * Moves the dials and reads them back.
   * Throws DriverError `refused` without a valid permit or beyond a rating, `wrong-read-back` when the dials did not follow.
   */
  setDials(move: DialMove): Promise<void>;
  readDials(): Promise<number[]>;
  /** Puts every dial to its highest position: the most resistance the box can offer. */
  park(permit: DischargePermit): Promise<void>;
}
