import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { cellsOf, overlayDepth, overlayText } from "@/components/recipe/cell-overlay";
import { placeAfter } from "@/components/recipe/matrix-keys";
import { RecipeMatrix } from "@/components/recipe/recipe-matrix";
import { demoBenches } from "@/lib/data/demo/demo-benches";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { demoModels } from "@/lib/data/demo/demo-units";
import { isLeftOut, planRun } from "@/lib/planning/plan";

const [north, , cold] = demoBenches(demoStandards(Date.UTC(2026, 5, 1)));
const { document } = demoRecipes[0]!;
const section = document.sections[0]!;
const room = { celsius: 23, humidityPercent: 40 };
const plan = planRun({ document, bench: north!, model: demoModels[0]!, room });

function render(onChange?: () => void): string {
  return renderToStaticMarkup(
    <RecipeMatrix
      nominalOhms={section.nominalOhms}
      testVolts={section.testVolts}
      isIncluded={(cell) => !isLeftOut(section, cell)}
      cells={cellsOf(plan)}
      describe={({ point }) => ({ text: overlayText(point, "time"), depth: overlayDepth(point, "time", plan) })}
      onChange={onChange}
    />,
  );
}

describe("the matrix of a recipe", () => {
  it("is a table with a head for each voltage and each resistance", () => {
    const html = render();
    expect(html.match(/scope="col"/gu)).toHaveLength(section.testVolts.length);
    expect(html.match(/scope="row"/gu)).toHaveLength(section.nominalOhms.length);
    expect(html).not.toContain("<button");
  });

  it("says of a left-out cell that it is left out", () => {
    expect(render().match(/left out/gu)).toHaveLength(section.excluded.length);
  });

  it("has one switch a cell when it may be changed, of which the Tab key reaches one", () => {
    const html = render(() => undefined);
    const cells = section.nominalOhms.length * section.testVolts.length;
    expect(html.match(/<button/gu)).toHaveLength(cells);
    expect(html.match(/aria-pressed="false"/gu)).toHaveLength(section.excluded.length);
    expect(html.match(/tabindex="0"/giu)).toHaveLength(1);
    expect(html).toContain('aria-label="100.0\u2009kΩ at 50\u2009V, ');
  });

  it("tints the longest point deepest", () => {
    const byTime = plan.points.toSorted((a, b) => a.forecastSeconds - b.forecastSeconds);
    expect(overlayDepth(byTime[0]!, "time", plan)).toBe(0);
    expect(overlayDepth(byTime.at(-1)!, "time", plan)).toBe(1);
  });

  it("knows the cells that a bench cannot run from those that the recipe leaves out", () => {
    const kinds = [...cellsOf(planRun({ document, bench: cold!, model: demoModels[0]!, room })).values()];
    expect(kinds).toHaveLength(section.nominalOhms.length * section.testVolts.length);
    expect(kinds.filter(({ kind }) => kind === "left-out")).toHaveLength(section.excluded.length);
    expect(kinds.some(({ kind }) => kind === "forced-out")).toBe(true);
  });
});

describe("the keys of the matrix", () => {
  it.each([
    ["ArrowRight", { row: 1, column: 2 }],
    ["ArrowLeft", { row: 1, column: 0 }],
    ["ArrowUp", { row: 0, column: 1 }],
    ["ArrowDown", { row: 2, column: 1 }],
    ["Home", { row: 1, column: 0 }],
    ["End", { row: 1, column: 3 }],
    ["PageUp", { row: 0, column: 1 }],
    ["PageDown", { row: 4, column: 1 }],
  ])("%s moves the focus", (key, place) => expect(placeAfter(key, { row: 1, column: 1 }, 5, 4)).toEqual(place));

  it("stop at the edges and leave other keys alone", () => {
    expect(placeAfter("ArrowUp", { row: 0, column: 0 }, 5, 4)).toEqual({ row: 0, column: 0 });
    expect(placeAfter("ArrowRight", { row: 0, column: 3 }, 5, 4)).toEqual({ row: 0, column: 3 });
    expect(placeAfter(" ", { row: 0, column: 0 }, 5, 4)).toBeNull();
  });
});
