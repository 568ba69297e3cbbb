"use client";

import { Pagination } from "@/components/ui/pagination";
import type { RunQuery } from "@/lib/schemas/run";
import { pageSpan, runQueryPath } from "./run-query-url";

/** Which rows these are, and the way to the others. */
export function RunPager({ query, total }: { query: RunQuery; total: number }) {
  const { first, last, pages } = pageSpan(query, total);
  return (
    <Pagination
      page={query.page}
      pages={pages}
      summary={total === 1 ? "1 run" : `Runs ${first} to ${last} of ${total}`}
      hrefFor={(page) => runQueryPath(query, { page })}
    />
  );
}
