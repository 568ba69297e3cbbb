import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";

interface EditorBarProps {
  /** Where this is and what it is called. */
  heading: ReactNode;
  version: number;
  isDirty: boolean;
  isSaving: boolean;
  /** Fields with something wrong, as far as it is shown. */
  problemCount: number;
  cancelHref: string;
  /** Absent for those who may not release. */
  onRelease: (() => void) | undefined;
}

/** Storing and releasing, and whether there is something to store. */
export function EditorBar({
  heading,
  version,
  isDirty,
  isSaving,
  problemCount,
  cancelHref,
  onRelease,
}: EditorBarProps) {
  return (
    <div className="flex flex-wrap items-center justify-end gap-2.5">
      <div className="mr-auto min-w-0">{heading}</div>
      <span role="status" className="text-label text-ink-2">
        {statusOf({ isDirty, isSaving, problemCount })}
      </span>
      <Button href={cancelHref} variant="bare">
        Leave
      </Button>
      <Button type="submit" variant={onRelease ? "plain" : "main"} busy={isSaving}>
        Save draft
      </Button>
      {onRelease && (
        <Button variant="main" onClick={onRelease} disabled={isSaving}>
          Release version {version}
        </Button>
      )}
    </div>
  );
}

function statusOf({ isDirty, isSaving, problemCount }: Pick<EditorBarProps, "isDirty" | "isSaving" | "problemCount">) {
  if (isSaving) return "Storing";
  if (problemCount > 0)
    return problemCount === 1 ? "1 field is not right yet." : `${problemCount} fields are not right yet.`;
  return isDirty ? "Changes are not stored yet." : "";
}
