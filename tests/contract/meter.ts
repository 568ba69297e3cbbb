import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { Meter } from "@/drivers/meter";

export interface MeterUnderTest {
  meter: Meter;
  /** Puts a known voltage on the terminals and resolves when it stands. */
  energise(): Promise<{ volts: number; amperes: number }>;
  /** Takes it away and resolves when the terminals are discharged. */
  discharge(): Promise<void>;
  close(): Promise<void>;
}

/** What the safe state relies on from every bench meter. */
export function describeMeter(name: string, open: () => Promise<MeterUnderTest>): void {
  describe(`meter: ${name}`, () => {
    let bench: MeterUnderTest;

    beforeEach(async () => {
      bench = await open();
    });
    afterEach(() => bench.close());

    it("says who it is", async () => {
      expect((await bench.meter.identify()).serialNumber).not.toBe("");
    });

    it("reads voltage and current at the terminals within one per cent", async () => {
      const { volts, amperes } = await bench.energise();
      expect((await bench.meter.readVolts()) / volts).toBeCloseTo(1, 2);
      expect((await bench.meter.readAmperes()) / amperes).toBeCloseTo(1, 2);
    });

    it("reads next to nothing when the terminals are discharged", async () => {
      await bench.energise();
      await bench.discharge();
      expect(Math.abs(await bench.meter.readVolts())).toBeLessThan(1);
    });

    it("can be closed twice", async () => {
      await bench.meter.close();
      await bench.meter.close();
      await expect(bench.meter.readVolts()).rejects.toMatchObject({ name: "DriverError", code: "port-lost" });
    });
  });
}
