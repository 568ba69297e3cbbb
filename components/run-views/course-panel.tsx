import Link from "next/link";
import { JournalList } from "@/components/journal/journal-list";
import { Panel } from "@/components/ui/panel";
import type { JournalLine } from "@/lib/journal/run-state";
import { runPath } from "./run-links";

/** What did not go straight on: holds, faults, points measured again. */
export function CoursePanel({ runId, lines }: { runId: string; lines: readonly JournalLine[] }) {
  return (
    <Panel
      title="How the run went"
      right={
        <Link href={runPath(runId, "journal")} className="text-water underline underline-offset-3">
          Journal
        </Link>
      }
      padding="flush"
    >
      {lines.length === 0 ? (
        <p className="px-3.5 py-3 text-ink-2">Straight through: no hold, no fault, no point measured twice.</p>
      ) : (
        <JournalList lines={lines} order="oldest-first" />
      )}
    </Panel>
  );
}
