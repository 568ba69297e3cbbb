"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function JournalError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="This journal" onRetry={retry} />;
}
