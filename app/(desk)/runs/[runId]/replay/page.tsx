import type { Metadata } from "next";
import { ReplayLoader } from "@/components/run-views/replay-loader";
import { keptCrumbs } from "@/components/run-views/run-links";
import { RunWhen } from "@/components/run-views/run-when";
import { unitTitle } from "@/lib/journal/selectors";
import { loadRun, runTitle } from "../load-run";

interface ReplayPageProps {
  params: Promise<{ runId: string }>;
  searchParams: Promise<{ at?: string | string[] }>;
}

export async function generateMetadata({ params }: ReplayPageProps): Promise<Metadata> {
  return { title: await runTitle(params, "replay") };
}

export default async function ReplayPage({ params, searchParams }: ReplayPageProps) {
  const { runId, state } = await loadRun(params);
  const at = Number((await searchParams).at);
  return (
    <ReplayLoader
      key={runId}
      runId={runId}
      atSeq={Number.isInteger(at) && at > 0 ? at : 1}
      title={unitTitle(state)}
      crumbs={keptCrumbs(state, <RunWhen state={state} />)}
    />
  );
}
