import type { Metadata } from "next";
import Link from "next/link";
import { LiveBenches } from "@/components/run-views/live-benches";
import { PageFrame } from "@/components/run-views/page-frame";
import { RunRows } from "@/components/run-views/run-rows";
import { runRightsOf } from "../run-rights-of";
import { loadBenches } from "./load-benches";

export const metadata: Metadata = { title: "Benches" };

export default async function BenchesPage() {
  const { person, benches, runs, outside, latest, canStart, nowMs } = await loadBenches();
  return (
    <PageFrame>
      <h1 className="mb-1">Benches</h1>
      <LiveBenches initial={{ benches, runs }} rights={runRightsOf(person)} canStart={canStart} nowMs={nowMs} />
      <div className="mt-2 grid items-start gap-4 lg:grid-cols-2">
        <RunRows
          title="Points outside: to be looked at"
          rows={outside.rows}
          empty="No finished run has a point outside its limit."
          right={outside.total > 0 && <AllRuns href="/runs?outside=some&status=finished" count={outside.total} />}
        />
        <RunRows
          title="Latest runs"
          rows={latest.rows}
          empty="No run yet. Start one on a bench above: it steps the standard through a recipe and keeps every reading."
          right={latest.total > 0 && <AllRuns href="/runs" count={latest.total} />}
          withStairs
        />
      </div>
    </PageFrame>
  );
}

function AllRuns({ href, count }: { href: string; count: number }) {
  return (
    <Link href={href} className="text-water underline underline-offset-3">
      {count === 1 ? "1 run" : `All ${count} runs`}
    </Link>
  );
}
