import type { Clock } from "@/lib/engine/clock";
import type { Bench } from "@/lib/schemas/bench";
import type { TesterPhysics, Unit, UnitModel } from "@/lib/schemas/instrument";
import { BoxPhysics } from "./box-physics";
import { hashNormal } from "./noise";

/** The terminals charge through the tester's source, and discharge through the tester's own discharge resistor. */
const RISE_SECONDS = 0.04;
const DISCHARGE_SECONDS = 0.25;
/** Above this voltage a dial must not move (d.c. touch limit of IEC 61010-1 in normal condition; from memory). */
const TOUCH_VOLTS = 60;
/** A rating is exceeded beyond this share: the last digit of a sum is not a breach. */
const RATING_SLACK = 1.001;

export interface Violation {
  kind: "hot-dial-move" | "box-rating" | "bench-rating";
  atMs: number;
  words: string;
}

/** What a circuit remembers when nobody looks after it: the state that hardware would be in. */
export interface CircuitState {
  positions: number[];
  testVolts: number;
  isOutputOn: boolean;
}

export interface CircuitOptions {
  bench: Bench;
  clock: Clock;
  onChange?: () => void;
}

/**
 * The one circuit of a simulated bench: tester, leads and decade box.
 *
 * Terminal voltage V = min(E − I·Rs, Isc·R) with E = Un(1 + overshoot). Indication from conductance:
 * 1/X = (1 + g)/R + G_leak + I_off/V, approached with the time constant R·C plus the tester's filter.
 */
export class SimulatedCircuit {
  readonly violations: Violation[] = [];
  /** Faults of the wiring, for tests: the tester ignores its off switch; the terminals keep their charge. */
  readonly wiring = { isStuckOn: false, keepsCharge: false };
  readonly #bench: Bench;
  readonly #clock: Clock;
  readonly #box: BoxPhysics;
  readonly #onChange: () => void;
  #unit: { model: UnitModel; physics: TesterPhysics } | null = null;
  #state: CircuitState;
  #switchedAtMs: number;
  #voltsWhenSwitched = 0;
  #switchOns = 0;

  constructor({ bench, clock, onChange }: CircuitOptions) {
    if (!bench.simulation) throw new RangeError(`${bench.name} is not a simulated bench`);
    this.#bench = bench;
    this.#clock = clock;
    this.#onChange = onChange ?? (() => undefined);
    this.#box = new BoxPhysics(bench.standard, bench.simulation.seed, bench.simulation.roomCelsius);
    this.#state = {
      positions: bench.standard.decades.map((decade) => decade.highestPosition),
      testVolts: 0,
      isOutputOn: false,
    };
    this.#switchedAtMs = -Infinity;
  }

  get state(): Readonly<CircuitState> {
    return this.#state;
  }

  get unit(): { model: UnitModel; physics: TesterPhysics } | null {
    return this.#unit;
  }

  /** Puts the circuit into a remembered state, as hardware is found after its host has died. */
  restore(state: CircuitState): void {
    this.#state = { ...state };
    this.#switchedAtMs = this.#clock.monotonicMs() - 60_000;
  }

  /** Plugs a tester in; its output is off. Throws RangeError for a unit without physics. */
  connect(unit: Unit): void {
    if (!unit.simulation) throw new RangeError(`unit ${unit.assetNumber} has no physics to simulate`);
    this.#unit = { model: unit.model, physics: unit.simulation };
    this.#change({ isOutputOn: false, testVolts: unit.model.testVolts[0]! });
  }

  moveDials(positions: number[]): void {
    const terminalVolts = this.terminalVolts();
    const isMove = positions.some((position, index) => position !== this.#state.positions[index]);
    if (isMove && (this.#state.isOutputOn || terminalVolts > TOUCH_VOLTS)) {
      this.#record(
        "hot-dial-move",
        `dials moved with the output ${this.#state.isOutputOn ? "on" : "off"} and ${terminalVolts.toFixed(1)} V at the terminals`,
      );
    }
    this.#change({ positions });
    if (this.#state.isOutputOn) this.#checkRatings();
  }

  selectVoltage(testVolts: number): void {
    this.#change({ testVolts });
    if (this.#state.isOutputOn) this.#checkRatings();
  }

  switchOutput(isOutputOn: boolean): void {
    if (!isOutputOn && this.wiring.isStuckOn) return;
    if (isOutputOn === this.#state.isOutputOn) return;
    this.#change({ isOutputOn });
    if (!isOutputOn) return;
    this.#switchOns += 1;
    this.#checkRatings();
  }

  /** Voltage at the terminals now, in volts. */
  terminalVolts(): number {
    const seconds = this.#secondsSinceSwitch();
    if (this.#state.isOutputOn) {
      const end = this.#loadedVolts();
      return end + (this.#voltsWhenSwitched - end) * Math.exp(-seconds / RISE_SECONDS);
    }
    return this.wiring.keepsCharge
      ? this.#voltsWhenSwitched
      : this.#voltsWhenSwitched * Math.exp(-seconds / DISCHARGE_SECONDS);
  }

  /** Current through the box now, in amperes. */
  terminalAmperes(): number {
    const terminalVolts = this.terminalVolts();
    return terminalVolts / this.trueOhms(terminalVolts);
  }

  /** True resistance at the terminals in ohms. */
  trueOhms(acrossVolts: number): number {
    return this.#box.ohms(this.#state.positions, acrossVolts);
  }

  /** What the tester's display shows now, in ohms: quantised and held between updates; null when over its range or off. */
  displayedOhms(): number | null {
    if (!this.#unit || !this.#state.isOutputOn) return null;
    const { model, physics } = this.#unit;
    const update = Math.floor(this.#secondsSinceSwitch() / model.displayUpdateSeconds);
    const settling = this.settlingOhms(update * model.displayUpdateSeconds);
    const noisy = settling * (1 + physics.noise * hashNormal(physics.seed, this.#switchOns, update));
    const range = model.ranges.find(({ toOhms }) => noisy <= toOhms);
    return range ? Math.round(noisy / range.resolutionOhms) * range.resolutionOhms : null;
  }

  /** The tester's value `seconds` after switch-on, before noise and display. */
  settlingOhms(seconds: number): number {
    const { model } = this.#unit!;
    const end = this.endOhms();
    const tau = this.trueOhms(this.#loadedVolts()) * this.#bench.capacitanceFarads + model.filterSeconds;
    return end * (1 - Math.exp(-Math.max(0, seconds) / tau));
  }

  /** The value that the tester settles to. */
  endOhms(): number {
    const { physics } = this.#unit!;
    const loadedVolts = this.#loadedVolts();
    const trueOhms = this.trueOhms(loadedVolts);
    return 1 / ((1 + physics.gainError) / trueOhms + physics.leakageSiemens + physics.offsetAmperes / loadedVolts);
  }

  #loadedVolts(): number {
    if (!this.#unit) return 0;
    const { overshoot, sourceOhms, currentLimitAmperes } = this.#unit.physics;
    const emf = this.#state.testVolts * (1 + overshoot);
    const resistance = this.trueOhms(emf);
    return Math.min((emf * resistance) / (resistance + sourceOhms), currentLimitAmperes * resistance);
  }

  #secondsSinceSwitch(): number {
    return (this.#clock.monotonicMs() - this.#switchedAtMs) / 1000;
  }

  #change(change: Partial<CircuitState>): void {
    const isSwitch = change.isOutputOn !== undefined && change.isOutputOn !== this.#state.isOutputOn;
    if (isSwitch) this.#voltsWhenSwitched = this.terminalVolts();
    this.#state = { ...this.#state, ...change };
    if (isSwitch) this.#switchedAtMs = this.#clock.monotonicMs();
    this.#onChange();
  }

  #checkRatings(): void {
    const loadedVolts = this.#loadedVolts();
    if (loadedVolts > this.#bench.ratedVolts * RATING_SLACK) {
      this.#record("bench-rating", `${loadedVolts.toFixed(0)} V at a bench rated ${this.#bench.ratedVolts} V`);
    }
    if (loadedVolts > this.#bench.standard.ratedVolts * RATING_SLACK) {
      this.#record("box-rating", `${loadedVolts.toFixed(0)} V across a box rated ${this.#bench.standard.ratedVolts} V`);
    }
    for (const stress of this.#box.stresses(this.#state.positions, loadedVolts)) {
      const isWithin =
        stress.acrossVolts <= stress.ratedVolts * RATING_SLACK &&
        stress.amperes <= stress.ratedAmperes * RATING_SLACK &&
        stress.watts <= stress.ratedWatts * RATING_SLACK;
      if (isWithin) continue;
      const { stepOhms, acrossVolts, amperes, watts } = stress;
      this.#record(
        "box-rating",
        `the ${stepOhms} Ω decade at ${acrossVolts.toFixed(0)} V, ${amperes.toExponential(1)} A, ${watts.toFixed(2)} W`,
      );
    }
  }

  #record(kind: Violation["kind"], words: string): void {
    this.violations.push({ kind, atMs: this.#clock.nowMs(), words });
    this.#onChange();
  }
}
