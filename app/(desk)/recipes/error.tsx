"use client";

import { PageFailure } from "@/components/run-views/page-failure";

export default function RecipesError({ retry }: { error: unknown; retry: () => void }) {
  return <PageFailure what="The recipes" onRetry={retry} />;
}
