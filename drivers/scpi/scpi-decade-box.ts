import type { DecadeBoxRecord } from "@/lib/schemas/instrument";
import type { Volts } from "@/lib/units/quantities";
import type { DecadeBox, DialMove } from "../decade-box";
import type { DischargePermit } from "../discharge-permit";
import { DriverError } from "../driver-error";
import type { LinePort } from "../transport/line-port";
import { ScpiInstrument, type Recovery } from "./scpi-instrument";

const POSITIONS = /^\d{1,2}(?:,\d{1,2})*$/u;

export interface ScpiDecadeBoxOptions {
  port: LinePort;
  record: DecadeBoxRecord;
  /** Why these positions can't stand this voltage; null when they can. */
  checkRating: (positions: readonly number[], highestVolts: Volts) => string | null;
  onRecovered: (recovery: Recovery) => void;
}

/** A decade box: `SOUR:RES:POS 1,0,…` sets the dials from the heaviest decade on, `SOUR:RES:POS?` reads them back. */
export class ScpiDecadeBox extends ScpiInstrument implements DecadeBox {
  #provenOpening = 0;

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
    const count = this.options.record.decades.length;
    return this.query("SOUR:RES:POS?", (answer) => {
      const positions = POSITIONS.test(answer) ? answer.split(",").map(Number) : [];
      if (positions.length === count) return positions;
      throw this.senseless("SOUR:RES:POS?", answer, `list of ${count} dial positions`);
    });
  }

  park(permit: DischargePermit): Promise<void> {
    return this.#move(
      this.options.record.decades.map((decade) => decade.highestPosition),
      permit,
    );
  }

  async #move(positions: readonly number[], permit: DischargePermit): Promise<void> {
    this.#requirePermit(permit);
    await this.#proveIdentity();
    // Asked again at the last moment: the permit may have ended while the line was waiting for its turn.
    await this.set(`SOUR:RES:POS ${positions.join(",")}`, () => this.#requirePermit(permit));
    const found = await this.readDials();
    if (found.some((position, index) => position !== positions[index])) {
      throw this.wrongReadBack("dials", positions.join(" "), found.join(" "));
    }
  }

  #requirePermit(permit: DischargePermit): void {
    if (permit.isValid) return;
    throw this.#refuse("the terminals are not proven to be discharged", "Let the bench reach its safe state first.");
  }

  /** Ratings and corrections belong to one box: after each opening of the port, that box must be the one that answers. */
  async #proveIdentity(): Promise<void> {
    const { openings } = this.port;
    if (this.#provenOpening === openings) return;
    const { model, serialNumber } = await this.identify();
    const { record } = this.options;
    if (serialNumber !== record.serialNumber) {
      throw new DriverError(
        "wrong-identity",
        this.name,
        `The ${this.name} says that it is ${model} ${serialNumber}; this bench's standard is ${record.model} ${record.serialNumber}.`,
        "Connect the bench's own box, or have the register say which box stands on this bench.",
      );
    }
    this.#provenOpening = openings;
  }

  #refuse(reason: string, cure: string): DriverError {
    return new DriverError("refused", this.name, `The ${this.name} was not moved: ${reason}.`, cure);
  }
}
