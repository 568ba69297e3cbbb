import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Sliver, type SliverProps } from "@/components/marks/sliver";
import { StairLine } from "@/components/marks/stair-line";
import { VerdictMark, VerdictWord, VERDICT_WORDS, type PointVerdict } from "@/components/marks/verdict";
import type { StairGroup } from "@/lib/schemas/run";

const verdicts = Object.keys(VERDICT_WORDS) as PointVerdict[];

describe("verdict marks", () => {
  it.each(verdicts)("%s is told by a word beside its mark", (verdict) => {
    expect(renderToStaticMarkup(<VerdictWord verdict={verdict} />).toLowerCase()).toContain(
      `>${VERDICT_WORDS[verdict]}<`,
    );
  });

  it.each(verdicts)("%s has a name where its mark stands alone", (verdict) => {
    expect(renderToStaticMarkup(<VerdictMark verdict={verdict} />)).toContain(`aria-label="${VERDICT_WORDS[verdict]}"`);
  });

  it("have shapes of their own, so that colour is never needed", () => {
    const shapes = verdicts.map(
      (verdict) => /<svg[^>]*>(.*)<\/svg>/u.exec(renderToStaticMarkup(<VerdictMark verdict={verdict} />))![1],
    );
    expect(new Set(shapes).size).toBe(verdicts.length);
  });
});

describe("the sliver", () => {
  const sliver = (props: Partial<SliverProps>) =>
    renderToStaticMarkup(<Sliver errorOhms={0} limitOhms={100} verdict="inside" {...props} />);
  const tick = (html: string) => Number(/<rect x="([\d.]+)" y="1"/u.exec(html)?.[1]);

  it("puts the tick at the error's share of the limit", () => {
    expect(tick(sliver({ errorOhms: 0 }))).toBeCloseTo(28 - 1.5);
    expect(tick(sliver({ errorOhms: 100 }))).toBeCloseTo(46 - 1.5);
    expect(tick(sliver({ errorOhms: -50 }))).toBeCloseTo(19 - 1.5);
  });

  it("draws equal shares of different limits alike", () => {
    expect(sliver({ errorOhms: 1e7, limitOhms: 5e7 })).toBe(sliver({ errorOhms: 20, limitOhms: 100 }));
  });

  it("draws an arrowhead at the side where an outside error left, and no tick", () => {
    const low = sliver({ errorOhms: -140, verdict: "outside" });
    const high = sliver({ errorOhms: 101, verdict: "outside" });
    expect(low).toContain('data-arrow="low"');
    expect(high).toContain('data-arrow="high"');
    expect(tick(low)).toBeNaN();
  });

  it("draws a line for U only where U is known", () => {
    expect(sliver({ uncertaintyOhms: 50 })).toContain("M19.00 7H37.00");
    expect(sliver({ uncertaintyOhms: null })).not.toMatch(/ 7H/u);
  });

  it("stays empty without a limit", () => {
    expect(sliver({ limitOhms: null, verdict: "not-stated" })).not.toMatch(/<rect|<path/u);
  });
});

describe("the stair line", () => {
  const groups: StairGroup[] = [
    { testVolts: 250, steps: ["inside", "outside", "skipped"] },
    { testVolts: 500, steps: ["present", "open", "open"] },
  ];
  const steps = (html: string, step: string) =>
    [...html.matchAll(/<rect[^>]*y="([\d.]+)" height="([\d.]+)" data-step="([a-z-]+)"/gu)]
      .filter((match) => match[3] === step)
      .map((match) => ({
        top: Number(match[1]),
        bottom: Number(match[1]) + Number(match[2]),
        height: Number(match[2]),
      }));

  it("has a tread of 3 px for what is to come, and an outside step 3 px taller than an inside one", () => {
    const html = renderToStaticMarkup(<StairLine groups={groups} size="large" />);
    const inside = steps(html, "inside")[0]!;
    expect(steps(html, "open")[0]!.height).toBe(3);
    expect(steps(html, "outside")[0]!.height).toBe(inside.height + 3);
    expect(steps(html, "outside")[0]!.bottom).toBe(inside.bottom);
  });

  it("sets each voltage 6 px lower than the one before", () => {
    const html = renderToStaticMarkup(<StairLine groups={groups} size="band" />);
    expect(steps(html, "present")[0]!.bottom - steps(html, "inside")[0]!.bottom).toBe(6);
  });

  it("does not descend without end where the voltage changes at every point", () => {
    const many = Array.from({ length: 60 }, (_, index): StairGroup => ({
      testVolts: index % 2 ? 250 : 500,
      steps: ["inside"],
    }));
    const bottoms = steps(renderToStaticMarkup(<StairLine groups={many} size="large" />), "inside").map(
      (step) => step.bottom,
    );
    expect(bottoms.at(-1)! - bottoms[0]!).toBeLessThanOrEqual(36.001);
  });

  it("says in words how far the run is", () => {
    const html = renderToStaticMarkup(<StairLine groups={groups} size="small" />);
    expect(html).toContain('aria-label="3 of 6 points done, 1 inside, 1 outside, 1 skipped"');
  });

  it("is a slider with its moment in words where it can be scrubbed", () => {
    const html = renderToStaticMarkup(
      <StairLine
        groups={groups}
        size="large"
        cursor={{ point: 3, fraction: 0.5 }}
        onScrub={() => undefined}
        cursorText="14:20:31"
      />,
    );
    expect(html).toMatch(
      /role="slider"[^>]*aria-valuemin="1"[^>]*aria-valuemax="6"[^>]*aria-valuenow="4"[^>]*aria-valuetext="14:20:31"/u,
    );
  });
});
