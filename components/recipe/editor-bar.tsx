import { Button } from "@/components/ui/button";

interface EditorBarProps {
  version: number;
  isDirty: boolean;
  isSaving: boolean;
  cancelHref: string;
  /** Absent for those who may not release. */
  onRelease: (() => void) | undefined;
}

/** Storing and releasing, and whether there is something to store. */
export function EditorBar({ version, isDirty, isSaving, cancelHref, onRelease }: EditorBarProps) {
  return (
    <div className="flex flex-wrap items-center justify-end gap-2.5">
      <span role="status" className="mr-auto text-label text-ink-2">
        {isSaving ? "Storing" : isDirty ? "Changes are not stored yet." : ""}
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
