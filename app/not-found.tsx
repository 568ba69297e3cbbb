import type { Metadata } from "next";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export const metadata: Metadata = { title: "Nothing here" };

export default function NotFound() {
  return (
    <main className="mx-auto max-w-xl px-4 py-16">
      <EmptyState
        level={1}
        title="There is nothing at this address"
        text="The run, recipe or bench may have another number, or it was never here."
        action={<Button href="/benches">To the benches</Button>}
      />
    </main>
  );
}
