import { Button } from "@/components/ui/button";
import { Note } from "@/components/ui/note";

interface StartButtonProps {
  /** What keeps the run from being started; null when nothing does. */
  missing: string | null;
  isStarting: boolean;
  failure: string | null;
}

/** The one button of the page. It stays in reach of the keyboard while something is missing, and says what. */
export function StartButton({ missing, isStarting, failure }: StartButtonProps) {
  return (
    <div className="grid gap-2.5">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button
          variant="main"
          type="submit"
          aria-disabled={missing !== null || isStarting}
          aria-busy={isStarting || undefined}
          aria-describedby="missing"
          className="aria-disabled:border-line aria-disabled:bg-sunken aria-disabled:text-ink-2 max-sm:h-12 max-sm:w-full"
        >
          {isStarting ? "Starting the run" : "Start the run"}
        </Button>
        <p id="missing" role="status" className="text-small text-ink-2">
          {isStarting ? "The bench is checked once more." : missing}
        </p>
      </div>
      {failure && !isStarting && (
        <Note tone="bad" title="Not started." alert>
          {failure}
        </Note>
      )}
    </div>
  );
}
