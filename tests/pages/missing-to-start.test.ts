import { describe, expect, it } from "vitest";
import { missingToStart, type StartReadiness } from "@/components/start/missing-to-start";

const ready: StartReadiness = {
  hasUnit: true,
  hasRecipe: true,
  preflight: "ready",
  blocked: [],
  ticked: [true, true, true],
};

describe("what is missing before a run can start", () => {
  it("is nothing when everything is ready", () => expect(missingToStart(ready)).toBeNull());

  it.each([
    [{ hasUnit: false, hasRecipe: false }, "Choose the unit and the recipe to go on."],
    [{ hasUnit: false }, "Choose the unit to go on."],
    [{ hasRecipe: false }, "Choose the recipe to go on."],
    [{ ticked: [true, true, false] }, "Confirm the third line to go on."],
    [{ ticked: [false, true, false] }, "Confirm the first and third lines to go on."],
    [{ ticked: [false, false, false] }, "Confirm the three lines to go on."],
    [{ blocked: ["Room"] }, "Mend “Room” to go on."],
    [{ blocked: ["Room", "Devices answer"] }, "Mend the 2 blocked lines of the preflight to go on."],
    [{ preflight: "failed" as const }, "The preflight was not made. Check again to go on."],
    [{ preflight: "checking" as const }, "Checking the bench."],
  ])("says one thing for %j", (lack, sentence) => expect(missingToStart({ ...ready, ...lack })).toBe(sentence));

  it("asks for a person's hand before it waits for the bench", () => {
    const waiting = { ...ready, preflight: "checking" as const, ticked: [true, false, true] };
    expect(missingToStart(waiting)).toBe("Confirm the second line to go on.");
  });
});
