import type { Verdict } from "@/lib/schemas/run-event";
import { classNames } from "@/components/ui/class-names";

/** A verdict, or what stands in its place for a point that a person skipped. */
export type PointVerdict = Verdict | "skipped";

export const VERDICT_WORDS: Readonly<Record<PointVerdict, string>> = {
  inside: "inside",
  doubtful: "doubtful",
  outside: "outside",
  unsettled: "unsettled",
  "not-stated": "no limit stated",
  skipped: "skipped",
};

export const VERDICT_INKS: Readonly<Record<PointVerdict, string>> = {
  inside: "text-moss",
  doubtful: "text-ochre",
  outside: "text-brick",
  unsettled: "text-plum",
  "not-stated": "text-ink-2",
  skipped: "text-ink-2",
};

/** The mark alone, for places where its word stands in a legend on the same page. */
export function VerdictMark({ verdict, className }: { verdict: PointVerdict; className?: string }) {
  return (
    <svg
      viewBox="0 0 12 12"
      role="img"
      aria-label={VERDICT_WORDS[verdict]}
      className={classNames("size-3 flex-none", VERDICT_INKS[verdict], className)}
    >
      <MarkShape verdict={verdict} />
    </svg>
  );
}

export interface VerdictWordProps {
  verdict: PointVerdict;
  /** Other words for the same verdict, for example `Ready` or a count. */
  children?: string;
  className?: string;
}

/** Mark and word: a verdict is never told by colour alone. */
export function VerdictWord({ verdict, children, className }: VerdictWordProps) {
  const word = children ?? VERDICT_WORDS[verdict];
  return (
    <span
      className={classNames(
        "inline-flex items-center gap-1.5 align-middle text-small font-semibold whitespace-nowrap",
        VERDICT_INKS[verdict],
        className,
      )}
    >
      <svg viewBox="0 0 12 12" aria-hidden="true" className="size-3 flex-none">
        <MarkShape verdict={verdict} />
      </svg>
      {word.charAt(0).toUpperCase() + word.slice(1)}
    </span>
  );
}

/** Inside: a tick within the band; doubtful: at its edge; outside: an arrow that has left it; unsettled: a wave. */
export function MarkShape({ verdict }: { verdict: PointVerdict }) {
  switch (verdict) {
    case "inside":
      return (
        <>
          <rect x="1" y="3.5" width="10" height="5" fill="none" stroke="currentColor" strokeWidth="1.4" />
          <rect x="5" y="0.5" width="2" height="11" fill="currentColor" />
        </>
      );
    case "doubtful":
      return (
        <>
          <rect x="1" y="3.5" width="10" height="5" fill="none" stroke="currentColor" strokeWidth="1.4" />
          <rect x="9" y="0.5" width="2" height="11" fill="currentColor" />
          <path d="M6 6h6" stroke="currentColor" strokeWidth="1.4" />
        </>
      );
    case "outside":
      return (
        <>
          <path d="M3.5 3.5H1v5h2.5" fill="none" stroke="currentColor" strokeWidth="1.4" />
          <path d="M12 6 5.5.5v11z" fill="currentColor" />
        </>
      );
    case "unsettled":
      return <path d="M1 8q2-6 4-2t4-1 3-1" fill="none" stroke="currentColor" strokeWidth="1.6" />;
    case "not-stated":
      return <path d="M1 3.5h2m2 0h2m2 0h2M1 8.5h2m2 0h2m2 0h2M6 .5v11" stroke="currentColor" strokeWidth="1.4" />;
    case "skipped":
      return <path d="M1 6h10M7.5 2.5 11 6 7.5 9.5" fill="none" stroke="currentColor" strokeWidth="1.4" />;
  }
}
