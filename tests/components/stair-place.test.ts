import { describe, expect, it } from "vitest";
import { groupOf, placeAfterKey } from "@/components/marks/stair-place";
import type { StairGroup } from "@/lib/schemas/run";

const groups: StairGroup[] = [
  { testVolts: 250, steps: ["inside", "inside", "inside"] },
  { testVolts: 500, steps: ["inside", "inside"] },
];

describe("keys on the stair line", () => {
  it("go from point to point and stay within the run", () => {
    expect(placeAfterKey("ArrowRight", { point: 1, fraction: 0.4 }, groups)).toEqual({ point: 2, fraction: 0 });
    expect(placeAfterKey("ArrowRight", { point: 4, fraction: 0 }, groups)).toEqual({ point: 4, fraction: 1 });
    expect(placeAfterKey("ArrowLeft", { point: 0, fraction: 0 }, groups)).toEqual({ point: 0, fraction: 0 });
  });

  it("go back to the beginning of a point before leaving it", () => {
    expect(placeAfterKey("ArrowLeft", { point: 2, fraction: 0.4 }, groups)).toEqual({ point: 2, fraction: 0 });
    expect(placeAfterKey("ArrowLeft", { point: 2, fraction: 0 }, groups)).toEqual({ point: 1, fraction: 0 });
  });

  it("go from voltage to voltage by page keys", () => {
    expect(placeAfterKey("PageUp", { point: 1, fraction: 0 }, groups)).toEqual({ point: 3, fraction: 0 });
    expect(placeAfterKey("PageDown", { point: 4, fraction: 0 }, groups)).toEqual({ point: 3, fraction: 0 });
    expect(placeAfterKey("PageDown", { point: 3, fraction: 0 }, groups)).toEqual({ point: 0, fraction: 0 });
  });

  it("go to both ends, and leave other keys alone", () => {
    expect(placeAfterKey("Home", { point: 3, fraction: 0.2 }, groups)).toEqual({ point: 0, fraction: 0 });
    expect(placeAfterKey("End", { point: 0, fraction: 0 }, groups)).toEqual({ point: 4, fraction: 1 });
    expect(placeAfterKey("n", { point: 0, fraction: 0 }, groups)).toBeNull();
  });

  it("finds the group of a point", () => {
    expect(groupOf(groups, 2)).toEqual({ group: 0, first: 0 });
    expect(groupOf(groups, 3)).toEqual({ group: 1, first: 3 });
  });
});
