import type { Metadata } from "next";
import { PageFrame } from "@/components/run-views/page-frame";
import { RefreshWhileActive } from "@/components/runs-list/refresh-while-active";
import { RunFilter } from "@/components/runs-list/run-filter";
import { isFiltered, readRunQuery, runQueryPath, type SearchParams } from "@/components/runs-list/run-query-url";
import { RunPager } from "@/components/runs-list/run-pager";
import { RunsTable } from "@/components/runs-list/runs-table";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { can } from "@/lib/auth/permissions";
import { endedStatuses, runQuerySchema } from "@/lib/schemas/run";
import { requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export const metadata: Metadata = { title: "Runs" };

export default async function RunsPage({ searchParams }: { searchParams: Promise<SearchParams> }) {
  const person = await requirePerson("run.watch");
  const query = readRunQuery(await searchParams);
  const { repositories } = getServices();
  const [{ rows, total }, benches] = await Promise.all([repositories.runs.query(query), repositories.benches.list()]);
  const hasActive = rows.some(({ status }) => !endedStatuses.includes(status));
  return (
    <PageFrame>
      <h1>Runs</h1>
      {(total > 0 || isFiltered(query)) && <RunFilter benches={benches.map(({ id, name }) => ({ id, name }))} />}
      {rows.length > 0 ? (
        <section aria-label="Runs" className="rounded border border-line bg-panel">
          <RunsTable rows={rows} query={query} />
          <RunPager query={query} total={total} />
        </section>
      ) : (
        <section aria-label="Runs" className="rounded border border-line bg-panel">
          <NoRuns isFiltered={isFiltered(query)} isBeyond={total > 0} mayStart={can(person, "run.start")} />
        </section>
      )}
      {hasActive && <RefreshWhileActive />}
    </PageFrame>
  );
}

interface NoRunsProps {
  isFiltered: boolean;
  /** The URL asks for a page past the last one. */
  isBeyond: boolean;
  mayStart: boolean;
}

function NoRuns({ isFiltered, isBeyond, mayStart }: NoRunsProps) {
  const everything = runQueryPath(runQuerySchema.parse({}));
  if (isBeyond) {
    return (
      <EmptyState
        title="This page lies past the last run"
        action={<Button href={everything}>To the first page</Button>}
      />
    );
  }
  if (isFiltered) {
    return (
      <EmptyState title="No run fits these filters" action={<Button href={everything}>Clear the filters</Button>} />
    );
  }
  return (
    <EmptyState
      title="No run yet"
      text="A run steps a standard through a recipe in front of a unit, and keeps every reading."
      action={
        <Button href="/benches" variant={mayStart ? "main" : "plain"}>
          {mayStart ? "Choose a bench and start one" : "See the benches"}
        </Button>
      }
    />
  );
}
