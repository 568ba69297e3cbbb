"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function RunsError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="The list of runs" onRetry={retry} />;
}
