"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function ResultsError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="These results" onRetry={retry} />;
}
