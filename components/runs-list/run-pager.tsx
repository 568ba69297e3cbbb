"use client";

import { Pagination } from "@/components/ui/pagination";
import type { RunQuery } from "@/lib/schemas/run";
import { pageSpan, runQueryPath } from "./run-query-url";

/** Which rows these are, and the way to the others. */
export function RunPager({ query, total }: { query: RunQuery; total: number }) {
  const { first, last, pages } = pageSpan(query, total);
  if (pages === 1) {
    return <p className="px-3.5 py-2.5 text-small text-ink-2">{total === 1 ? "1 run" : `${total} runs`}</p>;
  }
  return (
    <Pagination
      page={query.page}
      pages={pages}
      summary={`Runs ${first} to ${last} of ${total}`}
      hrefFor={(page) => runQueryPath(query, { page })}
    />
  );
}
