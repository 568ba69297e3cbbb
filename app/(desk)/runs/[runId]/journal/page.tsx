import type { Metadata } from "next";
import { journalRows } from "@/components/run-views/course-of-run";
import { JournalTable } from "@/components/run-views/journal-table";
import { PageFrame } from "@/components/run-views/page-frame";
import { keptCrumbs, runPath } from "@/components/run-views/run-links";
import { RunPages } from "@/components/run-views/run-pages";
import { RunWhen } from "@/components/run-views/run-when";
import { RunHead } from "@/components/run/run-head";
import { Pagination } from "@/components/ui/pagination";
import { Panel } from "@/components/ui/panel";
import { unitTitle } from "@/lib/journal/selectors";
import { stateSentence } from "@/lib/journal/state-sentence";
import { getServices } from "@/lib/server/services";
import { loadRun, runTitle } from "../load-run";

const ROWS_PER_PAGE = 200;

interface JournalPageProps {
  params: Promise<{ runId: string }>;
  searchParams: Promise<{ page?: string | string[] }>;
}

export async function generateMetadata({ params }: JournalPageProps): Promise<Metadata> {
  return { title: await runTitle(params, "journal") };
}

/** Every event of the run in words, oldest first; readings are counted, and lie in the replay. */
export default async function JournalPage({ params, searchParams }: JournalPageProps) {
  const { runId, state } = await loadRun(params);
  const rows = journalRows(await getServices().repositories.journal.events(runId));
  const pages = Math.max(1, Math.ceil(rows.length / ROWS_PER_PAGE));
  const page = Math.min(pages, Math.max(1, Math.floor(Number((await searchParams).page)) || 1));
  const shown = rows.slice((page - 1) * ROWS_PER_PAGE, page * ROWS_PER_PAGE);
  const first = (page - 1) * ROWS_PER_PAGE + 1;
  return (
    <PageFrame>
      <RunHead
        crumbs={keptCrumbs(state, <RunWhen state={state} />)}
        title={unitTitle(state)}
        sentence={stateSentence(state)}
        commands={<RunPages runId={runId} here="journal" />}
      />
      <Panel
        title="Journal"
        note={`${state.lastSeq} records, ${state.lastSeq - rows.length} of them readings`}
        right="a press on a time replays that moment"
        padding="flush"
      >
        <JournalTable runId={runId} rows={shown} />
        <Pagination
          page={page}
          pages={pages}
          summary={`Events ${first} to ${first + shown.length - 1} of ${rows.length}`}
          hrefFor={(target) => `${runPath(runId, "journal")}?page=${target}`}
        />
      </Panel>
    </PageFrame>
  );
}
