import Link from "next/link";
import { ClockTime } from "@/components/ui/clock-time";
import { classNames } from "@/components/ui/class-names";
import { DataTable, TableHead } from "@/components/ui/data-table";
import type { JournalLine } from "@/lib/journal/run-state";
import { formatExactDuration } from "@/lib/units/format";
import type { JournalRow } from "./course-of-run";
import { runPath } from "./run-links";

const COLUMNS = [
  { id: "number", label: "Record", align: "right", className: "max-sm:hidden" },
  { id: "time", label: "Time" },
  { id: "elapsed", label: "Run time", align: "right", className: "max-sm:hidden" },
  { id: "readings", label: "Readings before", align: "right", className: "max-sm:hidden" },
  { id: "what", label: "What happened" },
] as const;

const TONES: Readonly<Record<JournalLine["tone"], string | null>> = {
  plain: null,
  inside: null,
  person: "font-semibold",
  doubtful: "bg-ochre-tint",
  outside: "bg-brick-tint",
  unsettled: "bg-plum-tint",
  trouble: "bg-brick-tint font-semibold",
};

/** Events of a run with time and words; each time leads to that moment in the replay. */
export function JournalTable({ runId, rows }: { runId: string; rows: readonly JournalRow[] }) {
  return (
    <DataTable caption="Events of the run, oldest first" dense>
      <TableHead columns={COLUMNS} />
      <tbody>
        {rows.map(({ line, readingsBefore }) => (
          <tr key={line.seq} id={`record-${line.seq}`} className={classNames(TONES[line.tone])}>
            <td className="figure w-16 text-ink-2 max-sm:hidden">{line.seq}</td>
            <td className="w-24 font-mono tabular">
              <Link
                href={`${runPath(runId, "replay")}?at=${line.seq}`}
                prefetch={false}
                className="text-water underline-offset-3 hover:underline"
              >
                <ClockTime atMs={line.atMs} seconds />
              </Link>
            </td>
            <td className="figure w-28 text-ink-2 max-sm:hidden">{formatExactDuration(line.elapsedMs / 1000)}</td>
            <td className="figure w-28 text-ink-2 max-sm:hidden">{readingsBefore > 0 ? readingsBefore : ""}</td>
            <td>{line.text}</td>
          </tr>
        ))}
      </tbody>
    </DataTable>
  );
}
