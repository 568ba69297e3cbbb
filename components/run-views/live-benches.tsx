"use client";

import { useRouter } from "next/navigation";
import { useEffect, useRef } from "react";
import { BenchBand } from "@/components/bench/bench-band";
import { StaleBanner } from "@/components/shell/stale-banner";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import type { BenchesView } from "@/lib/client/bench-follower";
import { useBenches } from "@/lib/client/use-benches";
import { useNow } from "@/lib/client/use-now";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import { BenchActions } from "./bench-actions";
import type { RunRights } from "./run-rights";

export interface LiveBenchesProps {
  initial: BenchesView;
  rights: RunRights;
  canStart: boolean;
  nowMs: number;
}

/** One band per bench, as it is at this moment. */
export function LiveBenches({ initial, rights, canStart, nowMs }: LiveBenchesProps) {
  const { benches, runs, contact } = useBenches(initial);
  const now = useNow(nowMs);
  const stale = contact.staleSinceMs !== null || contact.refusal !== null;
  useRefreshWhenRunsEnd(benches);
  if (benches.length === 0) return <NoBenches />;
  return (
    <>
      <StaleBanner sinceMs={contact.staleSinceMs} refusal={contact.refusal} />
      {benches.map((bench) => {
        const run = bench.activeRunId === null ? null : (runs[bench.activeRunId] ?? null);
        return (
          <BenchBand
            key={bench.id}
            snapshot={bench}
            run={run}
            nowMs={now}
            stale={stale}
            actions={
              bench.activeRunId !== null ? (
                <BenchActions key={bench.activeRunId} runId={bench.activeRunId} state={run} rights={rights} />
              ) : (
                canStart && (
                  <Button size="small" variant="main" href={`/benches/${encodeURIComponent(bench.id)}/start`}>
                    Start a run
                  </Button>
                )
              )
            }
          />
        );
      })}
    </>
  );
}

/** The lists under the bands come from the server: they are read again when a run starts or ends. */
function useRefreshWhenRunsEnd(benches: readonly BenchSnapshot[]): void {
  const router = useRouter();
  const active = benches.map((bench) => bench.activeRunId ?? "").join(" ");
  const known = useRef(active);
  useEffect(() => {
    if (known.current === active) return;
    known.current = active;
    router.refresh();
  }, [active, router]);
}

function NoBenches() {
  return (
    <section className="rounded border border-line bg-panel">
      <EmptyState
        title="No bench is set up yet"
        text="A bench is a place with a standard, the ports of its instruments and limits of its own. Benches are described in the data folder of this site; the guide in README.md says how."
      />
    </section>
  );
}
