import { describe, expect, it } from "vitest";
import { countsInWords, markOf } from "@/components/runs-list/run-words";
import type { VerdictCounts } from "@/lib/schemas/run";

function counts(some: Partial<VerdictCounts>): VerdictCounts {
  const none = { inside: 0, doubtful: 0, outside: 0, unsettled: 0, notStated: 0, skipped: 0, open: 0 };
  const given = { ...none, ...some };
  return { ...given, total: Object.values(given).reduce((sum, count) => sum + count, 0) };
}

describe("the counts of a run in words", () => {
  it.each([
    [{ inside: 60, outside: 2 }, "2 of 62 outside"],
    [{ inside: 62 }, "all 62 inside"],
    [{ inside: 1 }, "the one point inside"],
    [{ inside: 59, unsettled: 3 }, "59 of 62 inside, 3 unsettled"],
    [{ inside: 40, outside: 1, unsettled: 2, skipped: 1 }, "1 of 44 outside, 2 unsettled, 1 skipped"],
    [{ inside: 10, notStated: 5 }, "10 of 15 inside, 5 not judged"],
    [{}, "no points"],
  ])("says %j", (some, words) => expect(countsInWords(counts(some), "finished")).toBe(words));

  it("tells points still to come from points that never were measured", () => {
    expect(countsInWords(counts({ inside: 20, open: 42 }), "running")).toBe("20 of 62 inside, 42 to come");
    expect(countsInWords(counts({ inside: 20, open: 42 }), "stopped")).toBe("20 of 62 inside, 42 not measured");
    expect(countsInWords(counts({ open: 62 }), "running")).toBe("62 to come");
  });
});

describe("the mark of a run", () => {
  it.each([
    [{ inside: 60, outside: 2, unsettled: 1 }, "outside"],
    [{ inside: 60, doubtful: 2, unsettled: 1 }, "doubtful"],
    [{ inside: 60, unsettled: 1 }, "unsettled"],
    [{ inside: 62 }, "inside"],
    [{ inside: 40, open: 22 }, null],
    [{}, null],
  ])("of %j is its worst verdict, and inside only for all points", (some, mark) =>
    expect(markOf(counts(some))).toBe(mark),
  );
});
