import type { DecadeBoxRecord } from "@/lib/schemas/instrument";
import type { Volts } from "@/lib/units/quantities";
import type { DecadeBox, DialMove } from "../decade-box";
import type { DischargePermit } from "../discharge-permit";
import { DriverError } from "../driver-error";
import type { LinePort } from "../transport/line-port";
import { ScpiInstrument, type Recovery } from "./scpi-instrument";

export interface ScpiDecadeBoxOptions {
  port: LinePort;
  record: DecadeBoxRecord;
  /** Why these positions can't stand this voltage; null when they can. */
  checkRating: (positions: readonly number[], highestVolts: Volts) => string | null;
  onRecovered: (recovery: Recovery) => void;
}

/** A decade box: `SOUR:RES:POS 1,0,…` sets the dials from the heaviest decade on, `SOUR:RES:POS?` reads them back. */
export class ScpiDecadeBox extends ScpiInstrument implements DecadeBox {
  constructor(private readonly options: ScpiDecadeBoxOptions) {
    super(options.port, options.onRecovered);
  }

  async setDials({ positions, highestVolts, permit }: DialMove): Promise<void> {
    const breach = this.options.checkRating(positions, highestVolts);
    if (breach)
      throw this.#refuse(breach, "Leave this point out of the recipe, or use a standard that is rated for it.");
    await this.#move(positions, permit);
  }

  async readDials(): Promise<number[]> {
    return this.query("SOUR:RES:POS?", (answer) => {
      const positions = answer.split(",").map(Number);
      if (positions.length === this.options.record.decades.length && positions.every(Number.isInteger))
        return positions;
      throw new DriverError(
        "garbled-reply",
        this.name,
        `The ${this.name} reads its dials back as “${answer}”.`,
        "Check its cable, then resume.",
      );
    });
  }

  park(permit: DischargePermit): Promise<void> {
    return this.#move(
      this.options.record.decades.map((decade) => decade.highestPosition),
      permit,
    );
  }

  async #move(positions: readonly number[], permit: DischargePermit): Promise<void> {
    if (!permit.isValid) {
      throw this.#refuse("the terminals are not proven to be discharged", "Let the bench reach its safe state first.");
    }
    await this.set(`SOUR:RES:POS ${positions.join(",")}`);
    const found = await this.readDials();
    if (found.some((position, index) => position !== positions[index])) {
      throw this.wrongReadBack("dials", positions.join(" "), found.join(" "));
    }
  }

  #refuse(reason: string, cure: string): DriverError {
    return new DriverError("refused", this.name, `The ${this.name} was not moved: ${reason}.`, cure);
  }
}
