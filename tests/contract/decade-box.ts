import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { DecadeBox } from "@/drivers/decade-box";
import { DischargePermit } from "@/drivers/discharge-permit";
import { volts } from "@/lib/units/quantities";

export interface BoxUnderTest {
  box: DecadeBox;
  /** Highest position of each dial, from the heaviest decade on. */
  highestPositions: readonly number[];
  /** A setting and a voltage that the box must not see. */
  beyondRating: { positions: readonly number[]; highestVolts: number };
  close(): Promise<void>;
}

/** What the engine relies on from every decade box. */
export function describeDecadeBox(name: string, open: () => Promise<BoxUnderTest>): void {
  describe(`decade box: ${name}`, () => {
    let bench: BoxUnderTest;
    const cold = () => DischargePermit.issue(volts(0));
    const move = (positions: readonly number[], highestVolts = 10, permit = cold()) =>
      bench.box.setDials({ positions, highestVolts: volts(highestVolts), permit });

    beforeEach(async () => {
      bench = await open();
    });
    afterEach(() => bench.close());

    it("says who it is", async () => {
      const identity = await bench.box.identify();
      expect(identity.maker).not.toBe("");
      expect(identity.serialNumber).not.toBe("");
    });

    it("moves each dial through all its positions and reads them back", async () => {
      for (let position = 0; position <= Math.max(...bench.highestPositions); position += 1) {
        const positions = bench.highestPositions.map((highest) => Math.min(highest, position || 1));
        await move(positions);
        expect(await bench.box.readDials()).toEqual(positions);
      }
    });

    it("parks with every dial at its highest position", async () => {
      await move(bench.highestPositions.map(() => 1));
      await bench.box.park(cold());
      expect(await bench.box.readDials()).toEqual(bench.highestPositions);
    });

    it("does not move without a valid permit", async () => {
      await bench.box.park(cold());
      const revoked = cold();
      revoked.revoke();
      const ones = bench.highestPositions.map(() => 1);
      await expect(move(ones, 10, revoked)).rejects.toMatchObject({ name: "DriverError", code: "refused" });
      await expect(bench.box.park(revoked)).rejects.toMatchObject({ name: "DriverError", code: "refused" });
      expect(await bench.box.readDials()).toEqual(bench.highestPositions);
    });

    it("does not move to a setting beyond its rating, and says by how much", async () => {
      await bench.box.park(cold());
      const { positions, highestVolts } = bench.beyondRating;
      await expect(move(positions, highestVolts)).rejects.toMatchObject({
        name: "DriverError",
        code: "refused",
        message: expect.stringMatching(/would stand .+, rated .+/u) as string,
      });
      expect(await bench.box.readDials()).toEqual(bench.highestPositions);
    });

    it("can be closed twice", async () => {
      await bench.box.close();
      await bench.box.close();
      await expect(bench.box.readDials()).rejects.toMatchObject({ name: "DriverError", code: "port-lost" });
    });
  });
}
