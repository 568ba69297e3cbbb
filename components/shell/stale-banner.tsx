import { ClockTime } from "@/components/ui/clock-time";
import { Note } from "@/components/ui/note";

export interface StaleBannerProps {
  /** Since when nothing was heard; null while there is contact. */
  sinceMs: number | null;
  /** Why the server refuses this page, where it does. */
  refusal?: string | null;
}

/** Says since when the values on the page are old. The run itself goes on. */
export function StaleBanner({ sinceMs, refusal = null }: StaleBannerProps) {
  if (refusal !== null) {
    return (
      <Note tone="bad" alert title="The server refuses this page.">
        {refusal}
      </Note>
    );
  }
  if (sinceMs === null) return null;
  return (
    <Note tone="look" alert title="No contact.">
      Values are as of <ClockTime atMs={sinceMs} seconds className="tabular" />. The bench goes on by itself; to switch
      off now, use the tester or the bench’s own switch.
    </Note>
  );
}
