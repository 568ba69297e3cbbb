import { useId, type ReactNode } from "react";
import { classNames } from "./class-names";

export interface PanelProps {
  title: ReactNode;
  /** Small print beside the title. */
  note?: ReactNode;
  /** Stands at the right end of the head. */
  right?: ReactNode;
  /** `flush` for tables and lists that run to the edge. */
  padding?: "normal" | "flush";
  className?: string;
  children: ReactNode;
}

/** A titled surface; its title names the region. */
export function Panel({ title, note, right, padding = "normal", className, children }: PanelProps) {
  const id = useId();
  return (
    <section aria-labelledby={id} className={classNames("min-w-0 rounded border border-line bg-panel", className)}>
      <header className="flex min-h-10 flex-wrap items-center gap-x-3 gap-y-1 border-b border-line px-3.5 py-1.5">
        <h2 id={id}>{title}</h2>
        {note && <span className="text-label text-ink-2">{note}</span>}
        {right && <span className="ml-auto text-label text-ink-2">{right}</span>}
      </header>
      {padding === "normal" ? <div className="px-3.5 py-3">{children}</div> : children}
    </section>
  );
}
