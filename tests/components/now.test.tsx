import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Dials } from "@/components/now/dials";
import { Indication } from "@/components/now/indication";
import { NowPanel } from "@/components/now/now-panel";
import { nowSentence } from "@/components/now/now-words";
import { journalWithExclusion, runInProgress } from "./sample-run";

const words = (html: string) =>
  html
    .replace(/<[^>]*>/gu, " ")
    .replace(/\s+/gu, " ")
    .trim();

describe("the indication", () => {
  it("shows as many digits as the display has there", () => {
    const html = renderToStaticMarkup(<Indication ohms={9.6e9} resolutionOhms={1e7} />);
    expect(words(html)).toBe("Indication 9.60 GΩ");
  });

  it("says over range in words and stands empty without a reading", () => {
    expect(words(renderToStaticMarkup(<Indication ohms={null} overRange />))).toBe("Indication over range");
    expect(words(renderToStaticMarkup(<Indication ohms={null} />))).toBe("Indication –");
  });
});

describe("the dials", () => {
  it("stand in the order of the box with their weights, and are read out in words", () => {
    const html = renderToStaticMarkup(<Dials stepOhms={[1e10, 1e6, 100]} positions={[1, 0, 7]} />);
    expect(html).toContain('aria-label="Dials as read back: 1 at 10\u2009G, 0 at 1\u2009M, 7 at 100\u2009Ω"');
    expect(words(html)).toBe("1 10 G 0 1 M 7 100 Ω");
  });

  it("do not pretend to a position that was not read back", () => {
    const html = renderToStaticMarkup(<Dials stepOhms={[1e9]} positions={null} />);
    expect(html).toContain("not read back yet");
    expect(words(html)).toBe("– 1 G");
  });
});

describe("the panel of the present point", () => {
  it("shows the reading, the standard with its uncertainty and what is still missing", () => {
    const html = renderToStaticMarkup(<NowPanel state={runInProgress()} />);
    expect(words(html)).toContain("1.90 GΩ");
    expect(words(html)).toContain("2.000\u2009GΩ ±0.20 %".replace("\u2009", " "));
    expect(html).toMatch(/role="progressbar"[^>]*aria-valuenow="\d+"/u);
    expect(words(html)).toMatch(/Waiting 5 s/u);
  });

  it("says in a replay how the point ended", () => {
    const endedAt = { ohms: 1.95e9, settlingSeconds: 41 };
    const html = renderToStaticMarkup(<NowPanel state={runInProgress()} title="Then" endedAt={endedAt} />);
    expect(words(html)).toContain("Ended at 1.950 GΩ after 41 s");
  });

  it("warns where the output could not be proven off", () => {
    const state = journalWithExclusion().state();
    expect(nowSentence({ ...state, output: { state: "unknown", volts: null } })).toContain(
      "treat the terminals as live",
    );
  });
});
