import { describe, expect, it } from "vitest";
import { correctedOhms, expandedUncertaintyOhms, nominalOhmsOf } from "@/lib/metrology/decades";
import { ohms } from "@/lib/units/quantities";
import { box, decade, errorFrom } from "./builders";

const cold = { celsius: 23, acrossVolts: 0 };

describe("nominalOhmsOf", () => {
  it("adds position times step, without the residual resistance", () => {
    const nine = box([decade(10e9), decade(1e9), decade(100e3)], { residualOhms: ohms(0.5) });
    expect(nominalOhmsOf(nine, [9, 3, 5])).toBe(93_000_500_000);
    expect(nominalOhmsOf(nine, [0, 0, 0])).toBe(0);
  });

  it("carries no binary artefact from tenths of an ohm", () => {
    expect(nominalOhmsOf(box([decade(1), decade(0.1)]), [0, 3])).toBe(0.3);
    expect(nominalOhmsOf(box([decade(1), decade(0.1)]), [1, 7])).toBe(1.7);
  });

  it("names a position that the box lacks", () => {
    const small = box([decade(1e6), decade(1e5)]);
    expect(errorFrom(() => nominalOhmsOf(small, [1]))).toMatchObject({ name: "MetrologyError", field: "positions" });
    for (const position of [-1, 10, 1.5, NaN]) {
      expect(errorFrom(() => nominalOhmsOf(small, [1, position])).field).toBe("positions[1]");
    }
  });
});

describe("correctedOhms", () => {
  it("adds the residual resistance and the correction of each position", () => {
    const corrections = Array.from({ length: 10 }, (_, position) => 10 * position);
    const standard = box([decade(1e6, { correctionsOhms: corrections }), decade(1e5)], { residualOhms: ohms(0.25) });
    expect(correctedOhms(standard, [3, 2], cold)).toBeCloseTo(3_200_030.25, 6);
    expect(correctedOhms(standard, [0, 0], cold)).toBe(0.25);
  });

  it("follows the temperature from the reference of the certificate", () => {
    const standard = box([decade(1e9, { temperatureCoefficientPpmPerKelvin: 100 })], { referenceCelsius: 20 });
    expect(correctedOhms(standard, [5], { celsius: 25, acrossVolts: 0 })).toBeCloseTo(5e9 * 1.0005, 0);
    expect(correctedOhms(standard, [5], { celsius: 18, acrossVolts: 0 })).toBeCloseTo(5e9 * 0.9998, 0);
  });

  it("gives each decade its share of the voltage", () => {
    const standard = box([decade(1e9, { voltageCoefficientPpmPerVolt: -2 }), decade(1e8)]);
    // 10 V of 11 V stand across 1 GΩ of 1.1 GΩ: -20 ppm of 1 GΩ.
    expect(correctedOhms(standard, [1, 1], { celsius: 23, acrossVolts: 11 })).toBeCloseTo(1.1e9 - 20e3, 0);
  });

  it("names a missing correction and conditions that are no numbers", () => {
    const gapped = box([decade(1e6, { correctionsOhms: [0, 1, 2] })]);
    expect(errorFrom(() => correctedOhms(gapped, [4], cold)).field).toBe("decades[0].correctionsOhms[4]");
    const whole = box([decade(1e6)]);
    expect(errorFrom(() => correctedOhms(whole, [1], { celsius: NaN, acrossVolts: 0 })).field).toBe("celsius");
    expect(errorFrom(() => correctedOhms(whole, [1], { celsius: 23, acrossVolts: -1 })).field).toBe("acrossVolts");
  });
});

describe("expandedUncertaintyOhms", () => {
  it("adds the decades of one box linearly, as fully correlated (JCGM 100:2008, 5.2.2, note 1; from memory)", () => {
    const standard = box([decade(10e9, { uncertaintyPercent: 0.6 }), decade(1e9, { uncertaintyPercent: 0.3 })]);
    expect(expandedUncertaintyOhms(standard, [2, 5])).toBeCloseTo(0.12e9 + 0.015e9, 0);
    expect(expandedUncertaintyOhms(standard, [0, 0])).toBe(0);
  });
});
