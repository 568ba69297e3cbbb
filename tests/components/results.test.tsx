import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { defaultPointsView, PointsTable, type PointsView } from "@/components/results/points-table";
import { filterRows, pointRows, sortRows } from "@/components/results/points-rows";
import { ResultsHeadline } from "@/components/results/results-headline";
import { errorSeries } from "@/components/results/error-series";
import type { VerdictCounts } from "@/lib/schemas/run";
import { ines, journalWithExclusion } from "./sample-run";

const state = journalWithExclusion()
  .judged(0, "inside")
  .judged(1, "outside")
  .judged(2, "doubtful")
  .skipped(3, ines)
  .state();
const table = (view: PointsView = defaultPointsView) =>
  renderToStaticMarkup(<PointsTable state={state} view={view} onView={() => undefined} />);

describe("the table of points", () => {
  it("says by aria-sort which column it is sorted by, and which could be", () => {
    const html = table({ filter: "all", sort: { column: "error", direction: "falling" } });
    const sorts = [
      ...html.matchAll(/<th scope="col" aria-sort="(\w+)"[^>]*><button[^>]*>(?:<svg.*?<\/svg>)?([^<]*)/gu),
    ];
    expect(sorts.filter((match) => match[1] === "descending").map((match) => match[2])).toEqual(["Error %"]);
    expect(sorts.filter((match) => match[1] === "none").length).toBeGreaterThan(5);
  });

  it("writes errors with a true minus and the verdict in a word", () => {
    expect(table()).toContain("−7.00");
    expect(table()).toMatch(/Outside.*Doubtful.*Skipped/su);
  });

  it("has no column for U while no point has one", () => {
    expect(table()).not.toContain("U %");
  });

  it("shows only what asks for a look when filtered", () => {
    const rows = filterRows(pointRows(state), "outside-and-doubtful");
    expect(rows.map((row) => row.verdict)).toEqual(["outside", "doubtful"]);
  });

  it("sorts by the share of the limit, the skipped point last in either direction", () => {
    const order = (direction: "rising" | "falling") =>
      sortRows(pointRows(state), { column: "ratio", direction }).map((row) => row.point.index);
    expect(order("falling")).toEqual([1, 0, 2, 3]);
    expect(order("rising")).toEqual([0, 2, 1, 3]);
  });

  it("offers the next step where nothing has been judged", () => {
    const html = renderToStaticMarkup(
      <PointsTable state={journalWithExclusion().state()} view={defaultPointsView} onView={() => undefined} />,
    );
    expect(html).toContain("No point has been judged yet");
  });
});

describe("the headline of the results", () => {
  const none: VerdictCounts = {
    inside: 0,
    doubtful: 0,
    outside: 0,
    unsettled: 0,
    notStated: 0,
    skipped: 0,
    open: 0,
    total: 63,
  };
  const words = (counts: Partial<VerdictCounts>, status: "finished" | "stopped" = "finished") =>
    renderToStaticMarkup(<ResultsHeadline counts={{ ...none, ...counts }} status={status} />).replace(/<[^>]*>/gu, "");

  it("begins with what is outside and counts the rest", () => {
    expect(words({ outside: 9, doubtful: 2, inside: 52 })).toBe(
      "9 of 63 points outside, 2 doubtful, 52 inside. All settled.",
    );
  });

  it("says that all are inside only when nothing else happened", () => {
    expect(words({ inside: 63 })).toBe("All 63 points inside. All settled.");
    expect(words({ inside: 62, skipped: 1 })).toBe("62 of 63 points inside, 1 skipped. All settled.");
  });

  it("never says all settled of a run with an unsettled point, nor of a stopped one", () => {
    expect(words({ inside: 61, unsettled: 2 })).toBe("2 of 63 points unsettled, 61 inside. ");
    expect(words({ inside: 10, open: 53 }, "stopped")).toContain("53 not measured. Stopped before its end.");
  });
});

describe("the error series", () => {
  it("hold the judged points of each voltage by rising resistance", () => {
    const series = errorSeries(state);
    expect(series.map(({ testVolts, points }) => [testVolts, points.map((point) => point.nominalOhms)])).toEqual([
      [250, [1e9, 2e9]],
      [500, [1e9]],
    ]);
  });
});
