import type { DecadeBoxRecord } from "@/lib/schemas/instrument";
import { hashUniform } from "./noise";

/** Share of the stated uncertainty within which the true deviation of a position lies from its stated correction. */
const TRUE_SHARE = 0.5;

export interface DecadeStress {
  stepOhms: number;
  acrossVolts: number;
  amperes: number;
  watts: number;
  ratedVolts: number;
  ratedAmperes: number;
  ratedWatts: number;
}

/** What the resistors inside a decade box really are. */
export class BoxPhysics {
  constructor(
    private readonly record: DecadeBoxRecord,
    private readonly seed: number,
    private readonly roomCelsius: number,
  ) {}

  /** True resistance of one dial in ohms, with `acrossVolts` across it. */
  dialOhms(decadeIndex: number, position: number, acrossVolts: number): number {
    const decade = this.record.decades[decadeIndex]!;
    if (position === 0) return 0;
    const set = position * decade.stepOhms;
    const draw = 2 * hashUniform(this.seed, decadeIndex, position) - 1;
    const deviation = decade.correctionsOhms[position]! + (TRUE_SHARE * draw * decade.uncertaintyPercent * set) / 100;
    const warm = decade.temperatureCoefficientPpmPerKelvin * 1e-6 * (this.roomCelsius - this.record.referenceCelsius);
    const stressed = decade.voltageCoefficientPpmPerVolt * 1e-6 * acrossVolts;
    return (set + deviation) * (1 + warm + stressed);
  }

  /** True resistance of the box in ohms with `totalVolts` across it. */
  ohms(positions: readonly number[], totalVolts: number): number {
    const cold = this.#sum(positions, () => 0);
    return this.#sum(positions, (index, position) => (totalVolts * this.dialOhms(index, position, 0)) / cold);
  }

  /** Voltage, current and power at each dial in use. */
  stresses(positions: readonly number[], totalVolts: number): DecadeStress[] {
    const total = this.ohms(positions, totalVolts);
    const current = total > 0 ? totalVolts / total : 0;
    return positions.flatMap((position, index) => {
      if (position === 0) return [];
      const { stepOhms, ratedVolts, ratedAmperes, ratedWatts } = this.record.decades[index]!;
      const acrossVolts = current * this.dialOhms(index, position, 0);
      return [
        { stepOhms, acrossVolts, amperes: current, watts: current * acrossVolts, ratedVolts, ratedAmperes, ratedWatts },
      ];
    });
  }

  #sum(positions: readonly number[], acrossVolts: (index: number, position: number) => number): number {
    const dials = positions.map((position, index) => this.dialOhms(index, position, acrossVolts(index, position)));
    return Math.max(1e-3, this.record.residualOhms + dials.reduce((sum, value) => sum + value, 0));
  }
}
