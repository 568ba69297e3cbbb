import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { isFiltered, pageSpan, readRunQuery, runQueryPath, sortedBy } from "@/components/runs-list/run-query-url";
import { runQuerySchema, runSortSchema, type RunQuery } from "@/lib/schemas/run";

const plain = runQuerySchema.parse({});

function paramsOf(path: string): Record<string, string> {
  return Object.fromEntries(new URL(path, "http://bench.example").searchParams);
}

const queries: fc.Arbitrary<RunQuery> = fc.record({
  search: fc.string({ maxLength: 80 }).map((text) => text.trim()),
  status: fc.constantFrom("all", "active", "finished", "stopped"),
  bench: fc.string({ maxLength: 20 }),
  outside: fc.constantFrom("all", "some", "none"),
  sort: fc.constantFrom(...runSortSchema.options),
  direction: fc.constantFrom("rising", "falling"),
  page: fc.integer({ min: 1, max: 500 }),
  pageSize: fc.integer({ min: 5, max: 100 }),
});

describe("the query of the list of runs in the URL", () => {
  it("comes back from its address as it was", () => {
    fc.assert(
      fc.property(queries, (query) => {
        expect(readRunQuery(paramsOf(runQueryPath(query, { page: query.page })))).toEqual(query);
      }),
    );
  });

  it("leaves out what is as usual", () => {
    expect(runQueryPath(plain)).toBe("/runs");
    expect(runQueryPath(plain, { search: "0412", outside: "some" })).toBe("/runs?search=0412&outside=some");
  });

  it("begins at the first page when the filter or the order changes", () => {
    expect(runQueryPath({ ...plain, page: 4 }, { status: "finished" })).toBe("/runs?status=finished");
    expect(runQueryPath({ ...plain, page: 4, search: "IR" }, { page: 5 })).toBe("/runs?search=IR&page=5");
  });

  it("keeps what makes sense of an address that partly does not", () => {
    const query = readRunQuery({
      search: "0412",
      status: "gone",
      page: "-3",
      pageSize: "1000",
      sort: ["unit", "bench"],
    });
    expect(query).toEqual({ ...plain, search: "0412" });
  });

  it("turns the order round on the sorted column and begins naturally on another", () => {
    expect(sortedBy(plain, "number")).toEqual({ sort: "number", direction: "rising" });
    expect(sortedBy(plain, "unit")).toEqual({ sort: "unit", direction: "rising" });
    expect(sortedBy(plain, "outside")).toEqual({ sort: "outside", direction: "falling" });
  });

  it("knows a filter from an order", () => {
    expect(isFiltered({ ...plain, sort: "unit", page: 3 })).toBe(false);
    expect(isFiltered({ ...plain, bench: "north" })).toBe(true);
  });

  it("says which rows a page shows", () => {
    expect(pageSpan({ ...plain, page: 2 }, 45)).toEqual({ first: 21, last: 40, pages: 3 });
    expect(pageSpan({ ...plain, page: 3 }, 45)).toEqual({ first: 41, last: 45, pages: 3 });
  });
});
