import type { ReactNode } from "react";
import { classNames } from "./class-names";

export type NoteTone = "ok" | "look" | "bad" | "info";

const TONES: Readonly<Record<NoteTone, string>> = {
  ok: "border-moss bg-moss-tint",
  look: "border-ochre bg-ochre-tint",
  bad: "border-brick bg-brick-tint",
  info: "border-water bg-water-tint",
};

export interface NoteProps {
  tone: NoteTone;
  /** First words in bold. */
  title?: ReactNode;
  /** Stands at the right end. */
  action?: ReactNode;
  /** Announce at once when it appears. */
  alert?: boolean;
  className?: string;
  children?: ReactNode;
}

export function Note({ tone, title, action, alert = false, className, children }: NoteProps) {
  return (
    <div
      role={alert ? "alert" : undefined}
      className={classNames(
        "flex items-center gap-3 border-l-[3px] px-3 py-2 text-text text-ink",
        TONES[tone],
        className,
      )}
    >
      <div className="min-w-0 flex-1">
        {title && <b className="mr-1.5">{title}</b>}
        {children}
      </div>
      {action && <div className="flex-none">{action}</div>}
    </div>
  );
}
