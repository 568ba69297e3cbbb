import { describe, expect, it } from "vitest";
import { isAllowedHost, isOwnOrigin } from "@/lib/server/origin";

const allowed = ["localhost", "127.0.0.1", "[::1]", "bench.example"];

describe("hosts and origins", () => {
  it.each(["localhost:3000", "127.0.0.1:3000", "[::1]:3000", "BENCH.example"])("serves %s", (host) => {
    expect(isAllowedHost(host, allowed)).toBe(true);
  });

  it.each(["evil.example", "localhost.evil.example", "", undefined])("does not serve %s", (host) => {
    expect(isAllowedHost(host, allowed)).toBe(false);
  });

  it("takes a change from its own pages", () => {
    expect(isOwnOrigin({ origin: "http://localhost:3000", host: "localhost:3000", fetchSite: "same-origin" })).toBe(
      true,
    );
    expect(isOwnOrigin({ origin: "https://bench.example", host: "bench.example", fetchSite: null })).toBe(true);
  });

  it.each([
    ["another host", { origin: "http://evil.example", host: "localhost:3000" }],
    ["another port", { origin: "http://localhost:4000", host: "localhost:3000" }],
    ["no origin", { origin: null, host: "localhost:3000" }],
    ["an opaque origin", { origin: "null", host: "localhost:3000" }],
    ["something that is no address", { origin: "://", host: "localhost:3000" }],
    ["a cross-site fetch", { origin: "http://localhost:3000", host: "localhost:3000", fetchSite: "cross-site" }],
  ])("refuses a change from %s", (_, headers) => {
    expect(isOwnOrigin(headers)).toBe(false);
  });
});
