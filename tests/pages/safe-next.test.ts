import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { safeNext } from "@/components/auth/safe-next";

describe("where a person goes after signing in", () => {
  it.each(["/runs/abc?at=12", "/recipes?search=five%20voltage", "/benches/north/start?unit=tw-0412#cautions"])(
    "goes back to the page that was asked for: %s",
    (path) => expect(safeNext(path)).toBe(path),
  );

  it.each([
    "https://elsewhere.example/",
    "//elsewhere.example/runs",
    "/\\elsewhere.example",
    "\\/elsewhere.example",
    "/\t/elsewhere.example",
    "/.//elsewhere.example",
    "/runs/..//elsewhere.example",
    "javascript:alert(1)",
    "runs",
    "",
  ])("never leaves the site: %j", (path) => expect(safeNext(path)).toBe("/benches"));

  it.each(["/sign-in?next=/runs", "/first-run", "/api/session", "/"])("goes to the benches instead of %s", (path) =>
    expect(safeNext(path)).toBe("/benches"),
  );

  it("takes one path only", () => {
    expect(safeNext(["/runs", "/recipes"])).toBe("/benches");
    expect(safeNext(undefined)).toBe("/benches");
  });

  it("always gives a path that a browser resolves on the same host", () => {
    const pieces = fc.array(
      fc.constantFrom("/", "\\", ".", "..", "%2f", "@", ":", "?", "#", "\t", "\n", "runs", "a.example"),
    );
    fc.assert(
      fc.property(pieces, (parts) => {
        const path = safeNext(`/${parts.join("")}`);
        expect(path.startsWith("/")).toBe(true);
        expect(new URL(path, "https://bench.example/sign-in").host).toBe("bench.example");
      }),
    );
  });
});
