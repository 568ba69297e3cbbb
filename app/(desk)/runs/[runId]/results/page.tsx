import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { ErrorChart } from "@/components/results/error-chart";
import { ResultsHeadline } from "@/components/results/results-headline";
import { ConditionsPanel } from "@/components/run-views/conditions-panel";
import { courseOfRun } from "@/components/run-views/course-of-run";
import { CoursePanel } from "@/components/run-views/course-panel";
import { ExcludedPanel } from "@/components/run-views/excluded-panel";
import { PageFrame } from "@/components/run-views/page-frame";
import { PointsIsland } from "@/components/run-views/points-island";
import { keptCrumbs, runPath } from "@/components/run-views/run-links";
import { RunPages } from "@/components/run-views/run-pages";
import { RunWhen } from "@/components/run-views/run-when";
import { VoltagePanel } from "@/components/run-views/voltage-panel";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import { Panel } from "@/components/ui/panel";
import { pointSpans } from "@/lib/client/replay-stops";
import { isOver, unitTitle, verdictCounts } from "@/lib/journal/selectors";
import { getServices } from "@/lib/server/services";
import { loadRun, runTitle } from "../load-run";

interface ResultsPageProps {
  params: Promise<{ runId: string }>;
}

export async function generateMetadata({ params }: ResultsPageProps): Promise<Metadata> {
  return { title: await runTitle(params, "results") };
}

/** What came out of a run, under what conditions, and how it went. A run that goes on is shown live. */
export default async function ResultsPage({ params }: ResultsPageProps) {
  const { runId, state } = await loadRun(params);
  if (!isOver(state.status)) redirect(runPath(runId));
  const events = await getServices().repositories.journal.events(runId);
  const spans = pointSpans(events, state.lastSeq);
  return (
    <PageFrame>
      <div className="flex flex-wrap items-start gap-x-5 gap-y-3">
        <div className="min-w-0 flex-[1_1_22rem]">
          <Breadcrumb crumbs={keptCrumbs(state, <RunWhen state={state} />)} />
          <h1 className="mt-0.5">{unitTitle(state)}</h1>
          <ResultsHeadline counts={verdictCounts(state)} status={state.status} className="mt-0.5" />
        </div>
        <RunPages runId={runId} here="results" />
      </div>
      <div className="mt-1 grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_25rem]">
        <div className="grid gap-4">
          <Panel title="Error against resistance" note="per cent of the standard’s value" padding="flush">
            <ErrorChart state={state} />
          </Panel>
          <PointsIsland
            runId={runId}
            state={state}
            momentOf={Object.fromEntries(spans.map(({ point, completeSeq }) => [point, completeSeq]))}
          />
        </div>
        <aside className="grid gap-4">
          <VoltagePanel state={state} />
          <ConditionsPanel state={state} />
          {state.setup && <ExcludedPanel plan={state.setup.plan} />}
          <CoursePanel runId={runId} lines={courseOfRun(events)} />
        </aside>
      </div>
    </PageFrame>
  );
}
