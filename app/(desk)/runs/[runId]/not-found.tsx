import { PageFrame } from "@/components/run-views/page-frame";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

export default function RunNotFound() {
  return (
    <PageFrame>
      <EmptyState
        level={1}
        title="There is no such run"
        text="The address may be cut short, or belong to another site’s Stepwell. Every run of this site is in the list."
        action={
          <Button href="/runs" variant="main">
            To the list of runs
          </Button>
        }
      />
    </PageFrame>
  );
}
