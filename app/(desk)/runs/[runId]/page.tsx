import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { LiveRun } from "@/components/run-views/live-run";
import { runPath } from "@/components/run-views/run-links";
import { isOver } from "@/lib/journal/selectors";
import { getServices } from "@/lib/server/services";
import { runRightsOf } from "../../run-rights-of";
import { loadRun, runTitle } from "./load-run";

interface RunPageProps {
  params: Promise<{ runId: string }>;
}

export async function generateMetadata({ params }: RunPageProps): Promise<Metadata> {
  return { title: await runTitle(params, "live") };
}

/** The run while it goes on. One that is over is shown by its results. */
export default async function RunPage({ params }: RunPageProps) {
  const { runId, person, state, nowMs } = await loadRun(params);
  if (isOver(state.status)) redirect(runPath(runId, "results"));
  const bench = getServices()
    .benches.snapshots()
    .find(({ id }) => id === state.setup?.bench.id);
  return (
    <LiveRun
      key={runId}
      runId={runId}
      initial={state}
      bench={bench ?? null}
      rights={runRightsOf(person)}
      nowMs={nowMs}
    />
  );
}
