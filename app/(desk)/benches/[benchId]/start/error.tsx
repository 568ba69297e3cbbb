"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function StartError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="This page" onRetry={retry} />;
}
