import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { Tester } from "@/drivers/tester";
import { volts } from "@/lib/units/quantities";

export interface TesterUnderTest {
  tester: Tester;
  testVolts: readonly number[];
  /** A voltage that the tester does not have. */
  absentVolts: number;
  /** The resistance at the terminals, and the time that the tester takes to settle on it. */
  connectedOhms: number;
  settle(): Promise<void>;
  /** Puts more than the tester's highest range on its terminals, with the output off. */
  connectOverRange(): Promise<void>;
  close(): Promise<void>;
}

/** What the engine relies on from every tester. */
export function describeTester(name: string, open: () => Promise<TesterUnderTest>): void {
  describe(`tester: ${name}`, () => {
    let bench: TesterUnderTest;

    beforeEach(async () => {
      bench = await open();
    });
    afterEach(() => bench.close());

    it("says who it is", async () => {
      const identity = await bench.tester.identify();
      expect(identity.model).not.toBe("");
      expect(identity.serialNumber).not.toBe("");
    });

    it("selects each of its test voltages and puts out what was selected", async () => {
      for (const testVolts of bench.testVolts) {
        await bench.tester.selectVoltage(volts(testVolts));
        await bench.tester.switchOn();
        await bench.settle();
        const { on, terminalVolts } = await bench.tester.readOutput();
        expect(on).toBe(true);
        expect(terminalVolts).toBeGreaterThan(0.9 * testVolts);
        expect(terminalVolts).toBeLessThan(1.3 * testVolts);
        await bench.tester.switchOff();
        await bench.settle();
      }
    });

    it("refuses a voltage that it does not have, and keeps the one it had", async () => {
      await bench.tester.selectVoltage(volts(bench.testVolts[0]!));
      await expect(bench.tester.selectVoltage(volts(bench.absentVolts))).rejects.toMatchObject({
        name: "DriverError",
        code: "device-error",
      });
      await bench.tester.switchOn();
      await bench.settle();
      expect((await bench.tester.readOutput()).terminalVolts).toBeLessThan(1.3 * bench.testVolts[0]!);
    });

    it("is off when it was switched off, also twice", async () => {
      await bench.tester.switchOn();
      await bench.tester.switchOff();
      await bench.tester.switchOff();
      expect((await bench.tester.readOutput()).on).toBe(false);
      await bench.settle();
      expect((await bench.tester.readOutput()).terminalVolts).toBeLessThan(1);
    });

    it("reads the resistance at its terminals, with the reply kept letter for letter", async () => {
      await bench.tester.selectVoltage(volts(bench.testVolts.at(-1)!));
      await bench.tester.switchOn();
      await bench.settle();
      const { ohms, raw } = await bench.tester.readResistance();
      expect(ohms! / bench.connectedOhms).toBeGreaterThan(0.95);
      expect(ohms! / bench.connectedOhms).toBeLessThan(1.05);
      expect(Number(raw)).toBe(ohms);
    });

    it("reads null above its highest range", async () => {
      await bench.connectOverRange();
      await bench.tester.switchOn();
      await bench.settle();
      const { ohms, raw } = await bench.tester.readResistance();
      expect(ohms).toBeNull();
      expect(raw).not.toBe("");
    });

    it("can be closed twice", async () => {
      await bench.tester.close();
      await bench.tester.close();
      await expect(bench.tester.readOutput()).rejects.toMatchObject({ name: "DriverError", code: "port-lost" });
    });
  });
}
