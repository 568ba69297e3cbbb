import Link from "next/link";
import type { ReactNode } from "react";
import { classNames } from "./class-names";

export interface Segment<T extends string> {
  value: T;
  label: ReactNode;
  /** Makes the segment a link; give it to all segments or to none. */
  href?: string;
  disabled?: boolean;
}

export interface SegmentedProps<T extends string> {
  /** Says what is chosen here, for those who can't see it. */
  label: string;
  value: T;
  segments: readonly Segment<T>[];
  onChange?: (value: T) => void;
  className?: string;
}

const SEGMENT =
  "border-r border-line-strong px-3 text-small leading-7 last:border-r-0 whitespace-nowrap max-sm:leading-11";
const ON = "bg-ink font-semibold text-panel";
const OFF = "bg-panel text-ink hover:bg-sunken disabled:text-ink-3 disabled:hover:bg-panel";

/** One of a few views: links where each has an address, else buttons. */
export function Segmented<T extends string>({ label, value, segments, onChange, className }: SegmentedProps<T>) {
  const frame = classNames("inline-flex w-max max-w-full overflow-x-auto rounded border border-line-strong", className);
  if (segments.some((segment) => segment.href !== undefined)) {
    return (
      <nav aria-label={label} className={frame}>
        {segments.map((segment) => (
          <Link
            key={segment.value}
            href={segment.href ?? ""}
            aria-current={segment.value === value ? "page" : undefined}
            className={classNames(SEGMENT, "no-underline -outline-offset-2", segment.value === value ? ON : OFF)}
          >
            {segment.label}
          </Link>
        ))}
      </nav>
    );
  }
  return (
    <div role="group" aria-label={label} className={frame}>
      {segments.map((segment) => (
        <button
          key={segment.value}
          type="button"
          disabled={segment.disabled}
          aria-pressed={segment.value === value}
          onClick={() => onChange?.(segment.value)}
          className={classNames(SEGMENT, "-outline-offset-2", segment.value === value ? ON : OFF)}
        >
          {segment.label}
        </button>
      ))}
    </div>
  );
}
