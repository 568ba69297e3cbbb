"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function RunError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="This run" onRetry={retry} />;
}
