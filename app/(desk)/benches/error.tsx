"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function BenchesError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="The benches" onRetry={retry} />;
}
