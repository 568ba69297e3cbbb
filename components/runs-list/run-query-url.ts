import { runQuerySchema, type RunQuery } from "@/lib/schemas/run";

export type SearchParams = Readonly<Record<string, string | string[] | undefined>>;

const defaults: RunQuery = runQuerySchema.parse({});
const names = Object.keys(runQuerySchema.shape) as (keyof RunQuery)[];

/** The query that a URL asks for. A part that makes no sense counts as not given, so that an old link still opens. */
export function readRunQuery(params: SearchParams): RunQuery {
  const given = names.flatMap((name) => {
    const text = params[name];
    const parsed = typeof text === "string" ? runQuerySchema.shape[name].safeParse(text) : null;
    return parsed?.success ? [[name, parsed.data]] : [];
  });
  return { ...defaults, ...(Object.fromEntries(given) as Partial<RunQuery>) };
}

/** The address of a query, short: what is as usual is left out. A change other than of the page begins at page 1. */
export function runQueryPath(query: RunQuery, change: Partial<RunQuery> = {}): string {
  const next = { ...query, page: 1, ...change };
  const told = names.filter((name) => next[name] !== defaults[name]);
  const search = new URLSearchParams(told.map((name) => [name, String(next[name])])).toString();
  return search ? `/runs?${search}` : "/runs";
}

/** The way to go when a head is pressed: the other direction on the sorted column, else the column's natural one. */
export function sortedBy(query: RunQuery, sort: RunQuery["sort"]): Pick<RunQuery, "sort" | "direction"> {
  if (query.sort === sort) return { sort, direction: query.direction === "rising" ? "falling" : "rising" };
  const isCount = sort === "number" || sort === "started" || sort === "outside";
  return { sort, direction: isCount ? "falling" : "rising" };
}

/** Whether anything but order and page narrows the list. */
export function isFiltered(query: RunQuery): boolean {
  const narrowing = ["search", "status", "bench", "outside"] as const;
  return narrowing.some((name) => query[name] !== defaults[name]);
}

export interface PageSpan {
  first: number;
  last: number;
  pages: number;
}

/** Which rows of the whole a page shows: `{ first: 21, last: 40, pages: 3 }`. */
export function pageSpan({ page, pageSize }: RunQuery, total: number): PageSpan {
  const first = (page - 1) * pageSize + 1;
  return { first, last: Math.min(total, page * pageSize), pages: Math.max(1, Math.ceil(total / pageSize)) };
}
