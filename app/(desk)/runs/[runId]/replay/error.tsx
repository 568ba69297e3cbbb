"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function ReplayError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="This replay" onRetry={retry} />;
}
