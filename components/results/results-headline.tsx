import type { RunStatus, VerdictCounts } from "@/lib/schemas/run";
import { classNames } from "@/components/ui/class-names";

export interface ResultsHeadlineProps {
  counts: VerdictCounts;
  status: RunStatus | "empty";
  className?: string;
}

interface Lead {
  words: string;
  ink: string;
}

/** What the run came to, in one sentence with its counts. */
export function ResultsHeadline({ counts, status, className }: ResultsHeadlineProps) {
  const lead = leadOf(counts);
  const rest = restOf(counts, lead);
  return (
    <p className={classNames("text-state leading-6.5", className)}>
      <b className={lead.ink}>{lead.words}</b>
      {rest && `, ${rest}`}. {closingOf(counts, status)}
    </p>
  );
}

/** The worst comes first; all inside is said of a run only when nothing else happened in it. */
function leadOf(counts: VerdictCounts): Lead {
  const of = (count: number, word: string) => `${count} of ${counts.total} points ${word}`;
  if (counts.outside > 0) return { words: of(counts.outside, "outside"), ink: "text-brick" };
  if (counts.unsettled > 0) return { words: of(counts.unsettled, "unsettled"), ink: "text-plum" };
  if (counts.doubtful > 0) return { words: of(counts.doubtful, "doubtful"), ink: "text-ochre" };
  if (counts.inside > 0 && counts.inside === counts.total)
    return { words: `All ${counts.total} points inside`, ink: "text-moss" };
  return { words: of(counts.inside, "inside"), ink: "text-ink" };
}

function restOf(counts: VerdictCounts, lead: Lead): string {
  const parts: [number, string][] = [
    [counts.doubtful, "doubtful"],
    [counts.inside, "inside"],
    [counts.unsettled, "unsettled"],
    [counts.notStated, "without a stated limit"],
    [counts.skipped, "skipped"],
    [counts.open, "not measured"],
  ];
  return parts
    .filter(([count, word]) => count > 0 && !lead.words.endsWith(word))
    .map(([count, word]) => `${count} ${word}`)
    .join(", ");
}

function closingOf(counts: VerdictCounts, status: ResultsHeadlineProps["status"]): string {
  if (status === "stopped") return "Stopped before its end.";
  if (status !== "finished") return "Not finished yet.";
  return counts.unsettled === 0 ? "All settled." : "";
}
