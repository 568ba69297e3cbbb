import type { ReactNode } from "react";
import { classNames } from "./class-names";

export interface EmptyStateProps {
  title: string;
  /** The next step, in a sentence. */
  text?: ReactNode;
  note?: ReactNode;
  /** Offers that step. */
  action?: ReactNode;
  /** Heading level: 1 where this is the whole page. */
  level?: 1 | 2 | 3;
  className?: string;
}

export function EmptyState({ title, text, note, action, level = 2, className }: EmptyStateProps) {
  const Heading = `h${level}` as const;
  return (
    <div className={classNames("grid justify-items-start gap-2 px-3.5 py-8", className)}>
      <Heading className={level === 1 ? undefined : "text-state font-semibold"}>{title}</Heading>
      {text && <p className="max-w-prose text-ink-2">{text}</p>}
      {note && <p className="text-label text-ink-2">{note}</p>}
      {action && <div className="mt-2 flex flex-wrap gap-2">{action}</div>}
    </div>
  );
}
