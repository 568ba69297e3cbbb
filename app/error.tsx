"use client";

import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

/** Whatever a page could not finish. The run on the bench goes on without it. */
export default function ErrorPage({ error, retry }: { error: unknown; retry: () => void }) {
  const digest = error instanceof Error && "digest" in error ? String(error.digest) : null;
  return (
    <main className="mx-auto max-w-xl px-4 py-16">
      <EmptyState
        level={1}
        title="This page could not be shown"
        text="Runs on the benches are not affected: they go on by themselves. Try again; if it stays, tell whoever looks after Stepwell."
        note={digest ? `The server's log has it under ${digest}.` : undefined}
        action={
          <>
            <Button variant="main" onClick={retry}>
              Try again
            </Button>
            <Button href="/benches">To the benches</Button>
          </>
        }
      />
    </main>
  );
}
