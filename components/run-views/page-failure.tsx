"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { PageFrame } from "./page-frame";

export interface PageFailureProps {
  /** What could not be shown: `This run`. */
  what: string;
  onRetry: () => void;
}

/** For error boundaries. What happened is in the server's log; here stands what a person can do. */
export function PageFailure({ what, onRetry }: PageFailureProps) {
  return (
    <PageFrame>
      <div role="alert">
        <EmptyState
          level={1}
          title={`${what} could not be shown`}
          text="Something failed while this page was made. No measurement is touched by it: a bench goes on by itself, and its journal is kept. Try again; if it fails again, tell whoever looks after Stepwell."
          action={
            <>
              <Button variant="main" onClick={onRetry}>
                Try again
              </Button>
              <Button href="/benches">To the benches</Button>
            </>
          }
        />
      </div>
    </PageFrame>
  );
}
