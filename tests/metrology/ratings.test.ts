import { describe, expect, it } from "vitest";
import { checkRating, decadeStresses } from "@/lib/metrology/ratings";
import { amperes, volts } from "@/lib/units/quantities";
import { box, decade, errorFrom } from "./builders";

function plain(text: string | null): string | null {
  return text && text.replaceAll("\u2009", " ");
}

describe("decadeStresses", () => {
  it("finds 1 mA and 0.25 W for 250 V across 250 kΩ (Ohm's law, computed)", () => {
    const decades = [decade(100e3), decade(10e3)];
    const stresses = decades.flatMap((one, index) =>
      decadeStresses(
        { decade: one, position: index === 0 ? 2 : 5, nominalOhms: index === 0 ? 200e3 : 50e3 },
        250e3,
        250,
      ),
    );
    const watts = stresses.filter(({ quantity }) => quantity === "watts").map(({ value }) => value);
    expect(watts[0]! + watts[1]!).toBeCloseTo(0.25, 12);
    expect(stresses.find(({ quantity }) => quantity === "amperes")?.value).toBeCloseTo(1e-3, 15);
    expect(stresses.filter(({ quantity }) => quantity === "volts").map(({ value }) => value)).toEqual([200, 50]);
  });
});

describe("the loads for the rated current (R1: IEC 61557-2, 6.4, 1000 Ω for each volt)", () => {
  it.each([
    [50, 50e3],
    [100, 100e3],
    [250, 250e3],
    [500, 500e3],
    [1000, 1e6],
  ])("draw 1 mA at %d V from %d Ω", (testVolts, nominalOhms) => {
    const stresses = decadeStresses({ decade: decade(nominalOhms), position: 1, nominalOhms }, nominalOhms, testVolts);
    expect(stresses.find(({ quantity }) => quantity === "amperes")?.value).toBeCloseTo(1e-3, 15);
  });
});

describe("checkRating", () => {
  it("passes a setting that stands exactly what it is rated for", () => {
    const exact = box([decade(250e3, { ratedVolts: volts(250), ratedAmperes: amperes(1e-3), ratedWatts: 0.25 })]);
    expect(checkRating(exact, [1], 250)).toBeNull();
    expect(checkRating(exact, [1], 250.001)).not.toBeNull();
  });

  it("says what a decade would stand and what it is rated for", () => {
    const weak = box([decade(1e6), decade(100e3, { ratedWatts: 1 })]);
    // 632.5 V across 100 kΩ: 4 W.
    expect(plain(checkRating(weak, [0, 1], Math.sqrt(4 * 100e3)))).toBe(
      "the 100 kΩ decade would stand 4.0 W, rated 1.0 W",
    );
  });

  it("names the worst of several excesses", () => {
    const weak = box([decade(100e3, { ratedWatts: 0.5, ratedAmperes: amperes(1e-3) })], { ratedVolts: volts(250) });
    expect(plain(checkRating(weak, [1], 1000))).toBe("the 100 kΩ decade would stand 10 W, rated 500 mW");
    expect(plain(checkRating(weak, [9], 1000))).toBe("the box would stand 1000 V, rated 250 V");
    const thin = box([decade(100e3, { ratedAmperes: amperes(1e-3) })]);
    expect(plain(checkRating(thin, [1], 500))).toBe("the 100 kΩ decade would stand 5.0 mA, rated 1.0 mA");
  });

  it("leaves a dial at zero out of account, for it carries the current through its switch alone", () => {
    const mixed = box([decade(1e9, { ratedAmperes: amperes(1e-6) }), decade(1e6)]);
    expect(checkRating(mixed, [0, 1], 500)).toBeNull();
  });

  it("refuses any voltage with every dial at zero", () => {
    expect(plain(checkRating(box([decade(1e6)]), [0], 50))).toBe("every dial at zero would short 50 V");
    expect(checkRating(box([decade(1e6)]), [0], 0)).toBeNull();
  });

  it("names the input that it cannot use", () => {
    for (const value of [NaN, Infinity, -5]) {
      expect(errorFrom(() => checkRating(box([decade(1e6)]), [1], value)).field).toBe("highestVolts");
    }
    expect(errorFrom(() => checkRating(box([decade(1e6)]), [11], 50)).field).toBe("positions[0]");
  });
});
