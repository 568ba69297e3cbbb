import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Cautions } from "@/components/start/cautions";
import { CheckRow } from "@/components/start/check-row";
import { holdsEveryWord } from "@/components/start/search-choice";
import { StartButton } from "@/components/start/start-button";
import { cautionsFor } from "@/lib/planning/preflight-checks";
import { planRun } from "@/lib/planning/plan";
import { demoBenches } from "@/lib/data/demo/demo-benches";
import { demoRecipes } from "@/lib/data/demo/demo-recipes";
import { demoStandards } from "@/lib/data/demo/demo-standards";
import { demoModels } from "@/lib/data/demo/demo-units";

const plan = planRun({
  document: demoRecipes[0]!.document,
  bench: demoBenches(demoStandards(Date.UTC(2026, 5, 1)))[0]!,
  model: demoModels[0]!,
  room: { celsius: 23, humidityPercent: 40 },
});

describe("the start button", () => {
  it("can be reached while something is missing, and is described by what is missing", () => {
    const html = renderToStaticMarkup(
      <StartButton missing="Confirm the third line to go on." isStarting={false} failure={null} />,
    );
    expect(html).toMatch(/<button[^>]*aria-disabled="true"[^>]*aria-describedby="missing"/u);
    expect(html).not.toMatch(/<button[^>]* disabled=""/u);
    expect(html).toMatch(/id="missing"[^>]*>Confirm the third line to go on\./u);
  });

  it("is free when nothing is missing", () => {
    const html = renderToStaticMarkup(<StartButton missing={null} isStarting={false} failure={null} />);
    expect(html).toMatch(/aria-disabled="false"/u);
    expect(html).toContain("Start the run");
  });

  it("says why a start was refused", () => {
    const html = renderToStaticMarkup(
      <StartButton missing={null} isStarting={false} failure="The bench is not ready." />,
    );
    expect(html).toMatch(/role="alert".*Not started\..*The bench is not ready\./u);
  });
});

describe("a line of the preflight", () => {
  it("tells its state in words, the finding and the cure", () => {
    const check = {
      id: "room",
      title: "Room",
      state: "blocked",
      finding: "31.0 °C is outside",
      cure: "Wait.",
    } as const;
    const html = renderToStaticMarkup(<CheckRow check={check} />);
    for (const words of ["Blocked", "Room", "31.0 °C is outside", "Wait."]) expect(html).toContain(words);
  });
});

describe("the cautions", () => {
  const cautions = cautionsFor(plan);

  it("are boxes to tick, with the voltage and the note that Stepwell is no safety device", () => {
    const html = renderToStaticMarkup(
      <Cautions plan={plan} cautions={cautions} ticked={new Set([cautions[0]!])} onTick={() => undefined} />,
    );
    expect(html.match(/type="checkbox"/gu)).toHaveLength(3);
    expect(html.match(/checked=""/gu)).toHaveLength(1);
    expect(html).toContain("Up to 1200\u2009V will be present");
    expect(html).toContain("local rules and the makers’ manuals come first");
  });

  it("wait for the choices, on which the voltage depends", () => {
    const html = renderToStaticMarkup(
      <Cautions plan={null} cautions={[]} ticked={new Set()} onTick={() => undefined} />,
    );
    expect(html).not.toContain("checkbox");
    expect(html).not.toContain("Up to");
  });
});

describe("the search of a choice", () => {
  it("finds an entry by all words in any order", () => {
    expect(holdsEveryWord("Pellham IR-10, TW-0412 P10-4519", "0412")).toBe(true);
    expect(holdsEveryWord("Pellham IR-10, TW-0412 P10-4519", "tw-0412, pell")).toBe(true);
    expect(holdsEveryWord("Pellham IR-10, TW-0412 P10-4519", "0412 aldgrove")).toBe(false);
    expect(holdsEveryWord("anything", "")).toBe(true);
  });
});
