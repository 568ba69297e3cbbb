import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { RunsTable } from "@/components/runs-list/runs-table";
import { runQuerySchema, runSummarySchema } from "@/lib/schemas/run";

const run = runSummarySchema.parse({
  id: "a1",
  number: 213,
  status: "finished",
  benchId: "north",
  benchName: "North bench",
  unitId: "tw-0409",
  unitName: "Pellham IR-10",
  assetNumber: "TW-0409",
  recipeId: "r1",
  recipeName: "Five-voltage accuracy",
  recipeVersion: 4,
  condition: "as-found",
  startedBy: "Ines Marlow",
  startedAtMs: new Date(2026, 8, 2, 9, 5).getTime(),
  endedAtMs: null,
  counts: { inside: 2, doubtful: 0, outside: 1, unsettled: 0, notStated: 0, skipped: 0, open: 0, total: 3 },
  stairs: [{ testVolts: 250, steps: ["inside", "inside", "outside"] }],
});

function render(query: Parameters<typeof runQuerySchema.parse>[0] = {}): string {
  return renderToStaticMarkup(<RunsTable rows={[run]} query={runQuerySchema.parse(query)} />);
}

describe("the table of runs", () => {
  it("tells a run in one row, its counts in words", () => {
    const html = render();
    for (const words of [
      "213",
      "TW-0409",
      "Five-voltage accuracy, v4",
      "North bench",
      "As found",
      "2 Sep 2026, 09:05",
    ]) {
      expect(html).toContain(words);
    }
    for (const words of ["Ines Marlow", "1 of 3 outside", "Finished", 'href="/runs/a1"']) expect(html).toContain(words);
  });

  it("says at its heads what it is sorted by, and links to the other order", () => {
    const html = render({ sort: "unit", direction: "rising", search: "IR", page: 3 });
    expect(html.match(/aria-sort="ascending"/gu)).toHaveLength(1);
    expect(html).toContain('href="/runs?search=IR&amp;sort=unit"');
    expect(html).toContain('href="/runs?search=IR&amp;sort=outside"');
    expect(render()).toMatch(/aria-sort="descending"[^>]*>.{0,200}href="\/runs\?direction=rising"/u);
  });
});
