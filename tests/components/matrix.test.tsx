import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Matrix } from "@/components/matrix/matrix";
import { matrixTable } from "@/components/matrix/matrix-cells";
import { placeAfterArrow } from "@/components/matrix/matrix-place";
import { journalWithExclusion, runInProgress } from "./sample-run";

const render = () => renderToStaticMarkup(<Matrix state={runInProgress()} onSelect={() => undefined} />);

describe("the matrix", () => {
  it("is a table with a caption, a head for each voltage and each resistance", () => {
    const html = render();
    expect(html).toMatch(/<table[^>]*><caption[^>]*>Error of each point/u);
    expect(html.match(/<th scope="col"[^>]*>/gu)).toHaveLength(2);
    expect([...html.matchAll(/<th scope="row"[^>]*>([^<]*)</gu)].map((match) => match[1])).toEqual([
      "1.000\u2009GΩ",
      "2.000\u2009GΩ",
      "5.000\u2009GΩ",
    ]);
  });

  it("says the verdict of a judged cell in a word, not by its colour alone", () => {
    const html = render();
    expect(html).toContain('<span class="sr-only"> %, inside</span>');
    expect(html).toContain('<span class="sr-only"> %, outside</span>');
  });

  it("writes errors with a true minus", () => {
    const html = render();
    expect(html).toContain(">−7.00<");
    expect(html).not.toMatch(/>-\d/u);
  });

  it("tells the reason of an excluded cell at the cell and in a list that needs no pointer", () => {
    const html = render();
    expect(html).toContain('title="not run: 300 V is beyond its rating"');
    expect(html).toMatch(/<td[^>]*data-cell="excluded"[^>]*>.*?not run: 300 V is beyond its rating/u);
    expect(html).toMatch(/1 cell is not run.*<dt[^>]*>300 V is beyond its rating<\/dt>.*5\.000\u2009GΩ at 250\u2009V/u);
  });

  it("marks a skipped cell with its word and the present one with its phase", () => {
    const html = render();
    expect(html).toMatch(/data-cell="skipped".*?skipped/u);
    expect(html).toMatch(/data-cell="present".*?settling/u);
  });

  it("has one tab stop, and no buttons where nothing can be chosen", () => {
    expect(render().match(/<button[^>]*tabindex="0"/gu)).toHaveLength(1);
    expect(renderToStaticMarkup(<Matrix state={runInProgress()} />)).not.toContain("<button");
  });

  it("has a cell of neither kind where no section of the recipe has the point", () => {
    const row = matrixTable(runInProgress()).rows.at(-1)!;
    expect(row.cells.map((cell) => cell.kind)).toEqual(["excluded", "absent"]);
  });

  it("shows the cells of a run that has not begun its first point as to come", () => {
    const cells = matrixTable(journalWithExclusion().state()).rows.flatMap((row) => row.cells);
    expect(cells.filter((cell) => cell.kind === "open")).toHaveLength(4);
  });
});

describe("arrow keys in the matrix", () => {
  const table = matrixTable(runInProgress());

  it("go to the neighbouring point", () => {
    expect(placeAfterArrow("ArrowDown", { row: 0, column: 1 }, table)).toEqual({ row: 1, column: 1 });
    expect(placeAfterArrow("ArrowRight", { row: 0, column: 0 }, table)).toEqual({ row: 0, column: 1 });
  });

  it("stop where no point follows", () => {
    expect(placeAfterArrow("ArrowDown", { row: 1, column: 0 }, table)).toBeNull();
    expect(placeAfterArrow("ArrowLeft", { row: 0, column: 0 }, table)).toBeNull();
    expect(placeAfterArrow("Enter", { row: 0, column: 0 }, table)).toBeNull();
  });
});
