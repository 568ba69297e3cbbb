import { describe, expect, it } from "vitest";
import { BoxPhysics } from "@/drivers/simulated/box-physics";
import { SimulatedCircuit } from "@/drivers/simulated/circuit";
import { hashNormal, hashUniform } from "@/drivers/simulated/noise";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import type { DecadeBoxRecord, TesterPhysics, UnitModel } from "@/lib/schemas/instrument";
import { amperes, farads, ohms, volts } from "@/lib/units/quantities";
import { testBench, testBox, testDecade, testModel, testUnit } from "../support/test-bench";

/** A box whose true values are its nominal values to twelve digits. */
const perfectBox = testBox({
  decades: [100e9, 10e9, 1e9, 1e6, 1e3].map((stepOhms) => testDecade(stepOhms, { uncertaintyPercent: 1e-12 })),
});

interface Setup {
  box?: DecadeBoxRecord;
  physics?: Partial<TesterPhysics>;
  model?: UnitModel;
  positions: number[];
  testVolts: number;
}

function circuitWith({ box = perfectBox, physics = {}, model = testModel(), positions, testVolts }: Setup) {
  const clock = new VirtualClock({ startMs: 0 });
  const circuit = new SimulatedCircuit({ bench: testBench({ standard: box }), clock });
  circuit.connect(testUnit(physics, model));
  circuit.moveDials(positions);
  circuit.selectVoltage(testVolts);
  return { circuit, clock };
}

describe("the circuit's indication", () => {
  const faulty = { gainError: 0.001, leakageSiemens: 1 / 2e12, offsetAmperes: 0.2e-9 };

  // Computed from 1/X = (1 + g)/R + G_leak + I_off/V: check values of the model, calculated apart.
  it.each([
    [[0, 1, 0, 0, 0], 50, 9.5602294e9, -4.3977],
    [[0, 1, 0, 0, 0], 500, 9.9009901e9, -0.9901],
    [[0, 9, 0, 0, 0], 1000, 84.586466e9, -6.015],
  ])("at dials %j and %d V settles to %d Ω", (positions, testVolts, expected, errorPercent) => {
    const { circuit } = circuitWith({ physics: faulty, positions, testVolts });
    const shown = circuit.endOhms();
    expect(shown / expected).toBeCloseTo(1, 7);
    expect((shown / circuit.trueOhms(testVolts) - 1) * 100).toBeCloseTo(errorPercent, 4);
  });

  it("is that of parallel resistors where the terminals leak: 90 GΩ across 810 GΩ make 81 GΩ", () => {
    const { circuit } = circuitWith({
      physics: { leakageSiemens: 1 / 810e9 },
      positions: [0, 9, 0, 0, 0],
      testVolts: 1000,
    });
    expect(circuit.endOhms() / 81e9).toBeCloseTo(1, 9);
  });

  // First-order step response: t = R·C·ln(1/eps); 90 GΩ and 150 pF come within 1 % in 62.17 s.
  it("of 90 GΩ with 150 pF comes within 1 % in 62.17 s", () => {
    const { circuit } = circuitWith({
      model: testModel({ filterSeconds: 0 }),
      positions: [0, 9, 0, 0, 0],
      testVolts: 1000,
    });
    expect(1 - circuit.settlingOhms(62.17) / circuit.endOhms()).toBeCloseTo(0.01, 5);
    expect(1 - circuit.settlingOhms(13.5) / circuit.endOhms()).toBeCloseTo(Math.exp(-1), 6);
  });
});

describe("the tester's filter", () => {
  it("adds its own time constant to that of resistance and capacitance", () => {
    const { circuit } = circuitWith({
      model: testModel({ filterSeconds: 1.5 }),
      positions: [0, 1, 0, 0, 0],
      testVolts: 1000,
    });
    // 10 GΩ · 150 pF = 1.5 s, and as much again for the filter.
    expect(1 - circuit.settlingOhms(3) / circuit.endOhms()).toBeCloseTo(Math.exp(-1), 6);
  });
});

describe("the circuit's terminals", () => {
  it("are held by the current limit: 2 mA through 100 kΩ are 200 V, whatever was selected", async () => {
    const box = testBox({ decades: [testDecade(1e5, { uncertaintyPercent: 1e-12 })] });
    const { circuit, clock } = circuitWith({ box, positions: [1], testVolts: 1000 });
    circuit.switchOutput(true);
    await clock.sleep(2000);
    expect(circuit.terminalVolts()).toBeCloseTo(200, 6);
    expect(circuit.terminalAmperes()).toBeCloseTo(0.002, 9);
  });

  it("stand at the EMF less the drop in the source", async () => {
    const { circuit, clock } = circuitWith({
      physics: { overshoot: 0.1, sourceOhms: 1e6 },
      positions: [0, 0, 0, 9, 0],
      testVolts: 500,
    });
    circuit.switchOutput(true);
    await clock.sleep(2000);
    expect(circuit.terminalVolts()).toBeCloseTo((550 * 9) / 10, 6);
  });

  // V = V0·exp(-t/tau): from 1000 V to 60 V in 2.8134 tau, here of 0.25 s.
  it("fall from 1000 V to 60 V in 2.8134 time constants", async () => {
    const { circuit, clock } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    await clock.sleep(5000);
    circuit.switchOutput(false);
    expect(circuit.terminalVolts()).toBeCloseTo(1000, 3);
    await clock.sleep(2.8134 * 250);
    expect(circuit.terminalVolts()).toBeCloseTo(60, 2);
  });

  it("rise from what is left on them when the output comes back before they are discharged", async () => {
    const { circuit, clock } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    await clock.sleep(5000);
    circuit.switchOutput(false);
    await clock.sleep(250);
    circuit.switchOutput(true);
    expect(circuit.terminalVolts()).toBeCloseTo(1000 / Math.E, 2);
  });

  it("keep their voltage when they can't discharge, and the output stays on when its switch is stuck", async () => {
    const { circuit, clock } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    await clock.sleep(5000);
    circuit.wiring.isStuckOn = true;
    circuit.switchOutput(false);
    expect(circuit.state.isOutputOn).toBe(true);
    Object.assign(circuit.wiring, { isStuckOn: false, keepsCharge: true });
    circuit.switchOutput(false);
    await clock.sleep(60_000);
    expect(circuit.terminalVolts()).toBeCloseTo(1000, 3);
  });
});

describe("the tester's display", () => {
  const noisy = { physics: { seed: 9, noise: 0.01 }, positions: [0, 1, 0, 0, 0], testVolts: 500 };

  it("moves in steps of the range's resolution and holds between updates", async () => {
    const { circuit, clock } = circuitWith(noisy);
    circuit.switchOutput(true);
    const shown = new Map<number, Set<number | null>>();
    for (let poll = 0; poll < 300; poll += 1) {
      const update = Math.floor(clock.monotonicMs() / 500);
      shown.set(update, (shown.get(update) ?? new Set()).add(circuit.displayedOhms()));
      await clock.sleep(99);
    }
    expect(shown.size).toBeGreaterThan(50);
    expect([...shown.values()].every((values) => values.size === 1)).toBe(true);
    const settled = [...shown.values()].slice(20).map(([value]) => value!);
    expect(settled.every((value) => value % 100e6 === 0)).toBe(true);
    expect(new Set(settled).size).toBeGreaterThan(2);
  });

  it("shows the same whether it is polled often or seldom", async () => {
    const polled = async (everyMs: number) => {
      const { circuit, clock } = circuitWith(noisy);
      circuit.switchOutput(true);
      const values: (number | null)[] = [];
      for (let poll = 0; poll < 12_000 / everyMs; poll += 1) {
        await clock.sleep(everyMs);
        if (clock.monotonicMs() % 3000 === 0) values.push(circuit.displayedOhms());
      }
      return values;
    };
    const often = await polled(100);
    expect(often).toHaveLength(4);
    expect(await polled(3000)).toEqual(often);
  });

  it("is over its range above the last range, and without output", async () => {
    const { circuit, clock } = circuitWith({ positions: [1, 1, 0, 0, 0], testVolts: 1000 });
    expect(circuit.displayedOhms()).toBeNull();
    circuit.switchOutput(true);
    await clock.sleep(600_000);
    expect(circuit.endOhms()).toBeGreaterThan(100e9);
    expect(circuit.displayedOhms()).toBeNull();
  });
});

describe("the noise", () => {
  it("is spread evenly, and as a normal distribution of mean 0 and deviation 1", () => {
    const count = 20_000;
    const normals = Array.from({ length: count }, (_, index) => hashNormal(4, 1, index));
    const mean = normals.reduce((sum, value) => sum + value, 0) / count;
    const deviation = Math.sqrt(normals.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (count - 1));
    // Three standard errors: 3/√n and 3/√(2n).
    expect(Math.abs(mean)).toBeLessThan(0.0212);
    expect(Math.abs(deviation - 1)).toBeLessThan(0.015);
    const tenths = Array.from({ length: 10 }, () => 0);
    for (let index = 0; index < count; index += 1) tenths[Math.floor(10 * hashUniform(4, index, 2))]! += 1;
    expect(Math.min(...tenths)).toBeGreaterThan(0.045 * count * 2);
  });

  it("differs from one seed to the next", () => {
    expect(hashUniform(1, 0, 0)).not.toBe(hashUniform(2, 0, 0));
  });
});

describe("the resistors of a box", () => {
  it("lie within half of their certificate's uncertainty, and not exactly on it", () => {
    const record = testBox();
    const box = new BoxPhysics(record, 5, 23);
    const shares = record.decades.flatMap((decade, index) =>
      Array.from({ length: decade.highestPosition }, (_, below) => {
        const set = (below + 1) * decade.stepOhms;
        return (box.dialOhms(index, below + 1, 0) - set) / ((set * decade.uncertaintyPercent) / 100);
      }),
    );
    expect(shares).toHaveLength(72);
    expect(Math.max(...shares.map(Math.abs))).toBeLessThanOrEqual(0.5);
    expect(new Set(shares.map((share) => share.toFixed(6))).size).toBe(72);
  });

  it("follow their corrections, the room and the voltage across their own decade", () => {
    const coefficients = { temperatureCoefficientPpmPerKelvin: 100, voltageCoefficientPpmPerVolt: -2 };
    const decade = testDecade(1e9, { uncertaintyPercent: 1e-12, ...coefficients });
    decade.correctionsOhms[3] = 6e6;
    const box = new BoxPhysics(testBox({ residualOhms: ohms(0), decades: [decade, { ...decade }] }), 5, 28);
    expect(box.dialOhms(0, 3, 0) / (3.006e9 * (1 + 100e-6 * 5))).toBeCloseTo(1, 9);
    // 3 GΩ and 3 GΩ in series share 1000 V evenly: 500 V at -2 ppm/V lower each by 1000 ppm.
    expect(box.ohms([3, 3], 1000) / (2 * 3.006e9 * (1 + 500e-6 - 1000e-6))).toBeCloseTo(1, 9);
  });

  it("add their residual resistance once", () => {
    const box = new BoxPhysics(testBox({ residualOhms: ohms(0.4) }), 5, 23);
    expect(box.ohms([0, 0, 0, 0, 0, 0, 0, 0], 0)).toBeCloseTo(0.4, 9);
  });
});

describe("the violation record", () => {
  it("stays empty when dials move cold and ratings hold", async () => {
    const { circuit, clock } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    await clock.sleep(5000);
    circuit.switchOutput(false);
    await clock.sleep(5000);
    circuit.moveDials([0, 1, 0, 0, 0]);
    expect(circuit.violations).toEqual([]);
  });

  it("takes down a dial that moves with the output on", () => {
    const { circuit } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 50 });
    circuit.switchOutput(true);
    circuit.moveDials([0, 8, 0, 0, 0]);
    expect(circuit.violations.map(({ kind }) => kind)).toEqual(["hot-dial-move"]);
    expect(circuit.violations[0]!.words).toMatch(/output on/u);
  });

  it("takes down a dial that moves above 60 V with the output off, and none below", async () => {
    const { circuit, clock } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    await clock.sleep(5000);
    circuit.switchOutput(false);
    await clock.sleep(700);
    circuit.moveDials([0, 8, 0, 0, 0]);
    expect(circuit.violations.map(({ words }) => words)).toEqual([
      "dials moved with the output off and 60.8 V at the terminals",
    ]);
    await clock.sleep(10);
    circuit.moveDials([0, 7, 0, 0, 0]);
    expect(circuit.violations).toHaveLength(1);
  });

  it("does not take a repeated setting for a move", () => {
    const { circuit } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    circuit.moveDials([0, 9, 0, 0, 0]);
    expect(circuit.violations).toEqual([]);
  });

  // Ohm's law: 500 V across 400 kΩ are 1.25 mA and 0.625 W.
  it.each([
    ["volts", { ratedVolts: volts(499) }, /500 V/u],
    ["amperes", { ratedAmperes: amperes(1e-3) }, /1\.[23]e-3 A/u],
    ["watts", { ratedWatts: 0.6 }, /0\.6[23] W/u],
  ])("takes down a decade beyond its %s", (_quantity, changes, words) => {
    const box = testBox({ decades: [testDecade(1e5, { uncertaintyPercent: 1e-12, ...changes })] });
    const { circuit } = circuitWith({ box, positions: [4], testVolts: 500 });
    circuit.switchOutput(true);
    expect(circuit.violations.map(({ kind }) => kind)).toEqual(["box-rating"]);
    expect(circuit.violations[0]!.words).toMatch(words);
  });

  it("takes down a voltage above the bench's rating", () => {
    const clock = new VirtualClock({ startMs: 0 });
    const bench = testBench({ standard: perfectBox, ratedVolts: volts(600), capacitanceFarads: farads(0) });
    const circuit = new SimulatedCircuit({ bench, clock });
    circuit.connect(testUnit());
    circuit.selectVoltage(1000);
    circuit.switchOutput(true);
    expect(circuit.violations.map(({ kind }) => kind)).toEqual(["bench-rating"]);
  });

  it("stays empty when a unit is unplugged from a live bench, which ends its output", () => {
    const { circuit } = circuitWith({ positions: [0, 9, 0, 0, 0], testVolts: 1000 });
    circuit.switchOutput(true);
    circuit.connect(testUnit());
    expect(circuit.state.isOutputOn).toBe(false);
    expect(circuit.violations).toEqual([]);
  });
});
