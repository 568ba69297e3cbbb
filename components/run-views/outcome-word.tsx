import { VerdictWord } from "@/components/marks/verdict";
import { countsInWords, markOf, statusWords } from "@/components/runs-list/run-words";
import { endedStatuses, type RunSummary } from "@/lib/schemas/run";

/** The worst verdict of a run as mark and word, and its counts. Before the end only an outside point is a verdict. */
export function OutcomeWord({ run }: { run: Pick<RunSummary, "counts" | "status"> }) {
  const verdict = markOf(run.counts);
  const isSure = endedStatuses.includes(run.status) || verdict === "outside";
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3">
      {verdict && isSure ? (
        <VerdictWord verdict={verdict} className="min-w-20" />
      ) : (
        <span className="min-w-20 text-small font-semibold">{statusWords[run.status]}</span>
      )}
      <span className="text-small text-ink-2">{countsInWords(run.counts, run.status)}</span>
    </span>
  );
}
