import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { HatchStrip } from "@/components/shell/hatch-strip";
import { StaleBanner } from "@/components/shell/stale-banner";
import { themeFrom } from "@/components/shell/theme";

describe("the hatch strip", () => {
  const strip = (state: "off" | "on" | "unknown", volts: number | null) =>
    renderToStaticMarkup(<HatchStrip output={{ state, volts }} benchName="North bench" />);
  const words = (html: string) => html.replace(/<[^>]*>/gu, "");

  it("says in words that the output is on, at what voltage, and where", () => {
    expect(words(strip("on", 503))).toBe("OUTPUT ON 503\u2009V at the terminals of North bench");
    expect(words(strip("on", null))).toBe("OUTPUT ON voltage at the terminals of North bench");
  });

  it("treats an unknown output as live", () => {
    expect(strip("unknown", null)).toContain("hatch");
    expect(words(strip("unknown", null))).toBe("OUTPUT UNKNOWN: treat the terminals of North bench as live");
  });

  it("is absent while the output is off", () => {
    expect(strip("off", 0)).toBe("");
  });

  it("keeps its words for those who cannot see it where it is only an edge", () => {
    const html = renderToStaticMarkup(
      <HatchStrip output={{ state: "on", volts: 50 }} benchName="North bench" size="edge" />,
    );
    expect(html).toContain("OUTPUT ON 50.0\u2009V");
  });
});

describe("the banner of old values", () => {
  it("says since when, and nothing while there is contact", () => {
    expect(renderToStaticMarkup(<StaleBanner sinceMs={null} />)).toBe("");
    const html = renderToStaticMarkup(<StaleBanner sinceMs={Date.UTC(2026, 10, 30, 14, 21, 7)} />);
    expect(html).toContain("Values are as of");
    expect(html).toContain('dateTime="2026-11-30T14:21:07.000Z"');
  });

  it("gives the server's reason where it refuses the page", () => {
    expect(renderToStaticMarkup(<StaleBanner sinceMs={null} refusal="Sign in again." />)).toContain("Sign in again.");
  });
});

describe("the theme", () => {
  it("comes from the cookie, and from the machine when the cookie says nothing known", () => {
    expect(themeFrom("night")).toBe("night");
    expect(themeFrom(undefined)).toBe("system");
    expect(themeFrom("<script>")).toBe("system");
  });
});
