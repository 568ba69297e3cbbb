import { classNames } from "@/components/ui/class-names";
import { MarkShape, VERDICT_INKS, type PointVerdict } from "./verdict";

const WORDS: Readonly<Record<PointVerdict, string>> = {
  inside: "inside",
  doubtful: "doubtful: within the guard band",
  outside: "outside",
  unsettled: "unsettled",
  "not-stated": "no limit stated",
  skipped: "skipped",
};

export interface LegendProps {
  /** Which verdicts can occur here. */
  verdicts?: readonly PointVerdict[];
  /** Adds the hatched cell. */
  excluded?: boolean;
  className?: string;
}

/** The words of the marks, for pages that show the marks alone. */
export function Legend({
  verdicts = ["inside", "doubtful", "outside", "unsettled", "not-stated", "skipped"],
  excluded = false,
  className,
}: LegendProps) {
  return (
    <ul
      aria-label="Marks"
      className={classNames("flex flex-wrap items-center gap-x-4.5 gap-y-1 text-[0.8125rem]", className)}
    >
      {verdicts.map((verdict) => (
        <li key={verdict} className={classNames("flex items-center gap-1.5", VERDICT_INKS[verdict])}>
          <svg viewBox="0 0 12 12" aria-hidden="true" className="size-3 flex-none">
            <MarkShape verdict={verdict} />
          </svg>
          {WORDS[verdict]}
        </li>
      ))}
      {excluded && (
        <li className="flex items-center gap-1.5 text-ink-2">
          <span aria-hidden="true" className="excluded inline-block h-3 w-4 border border-line" />
          not in the recipe or not allowed
        </li>
      )}
    </ul>
  );
}
