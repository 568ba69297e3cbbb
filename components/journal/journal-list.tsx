import type { JournalLine } from "@/lib/journal/run-state";
import { classNames } from "@/components/ui/class-names";
import { ClockTime } from "@/components/ui/clock-time";

const TONES: Readonly<Record<JournalLine["tone"], string | null>> = {
  plain: null,
  inside: null,
  person: "font-semibold",
  doubtful: "bg-ochre-tint",
  outside: "bg-brick-tint",
  unsettled: "bg-plum-tint",
  trouble: "border-l-[3px] border-l-brick bg-brick-tint pl-[11px]",
};

export interface JournalListProps {
  /** Oldest first, as the run state keeps them. */
  lines: readonly JournalLine[];
  /** Newest first by default, so that what happens now stands on top. */
  order?: "newest-first" | "oldest-first";
  /** At most this many lines. */
  limit?: number;
}

/** The journal in words. */
export function JournalList({ lines, order = "newest-first", limit }: JournalListProps) {
  const kept = limit === undefined ? lines : lines.slice(-limit);
  const shown = order === "newest-first" ? kept.toReversed() : kept;
  return (
    <ol className="text-small">
      {shown.map((line) => (
        <li
          key={line.seq}
          className={classNames(
            "grid grid-cols-[4.9rem_minmax(0,1fr)] gap-2 border-b border-line px-3.5 py-[3px] last:border-b-0",
            TONES[line.tone],
          )}
        >
          <ClockTime atMs={line.atMs} seconds className="font-mono text-[0.8125rem] font-normal text-ink-2 tabular" />
          <span>{line.text}</span>
        </li>
      ))}
    </ol>
  );
}
