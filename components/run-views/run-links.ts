import type { Crumb } from "@/components/ui/breadcrumb";
import type { RunState } from "@/lib/journal/run-state";

/** Pages of a run that is over. */
export type RunPage = "results" | "replay" | "journal";

export function runPath(runId: string, page?: RunPage): string {
  return `/runs/${encodeURIComponent(runId)}${page ? `/${page}` : ""}`;
}

export function conditionWords(condition: "as-found" | "as-left"): string {
  return condition === "as-found" ? "as found" : "as left";
}

/** Where a live run stands: on its bench. */
export function liveCrumbs(state: RunState): Crumb[] {
  const { setup } = state;
  if (!setup) return [];
  return [
    { label: setup.bench.name, href: "/benches" },
    { label: `Run ${setup.runNumber}` },
    { label: conditionWords(setup.condition) },
    recipeCrumb(setup.recipe),
  ];
}

/** Where a kept run stands: among the runs. */
export function keptCrumbs(state: RunState, when: Crumb["label"]): Crumb[] {
  const { setup } = state;
  if (!setup) return [];
  return [
    { label: "Runs", href: "/runs" },
    { label: `Run ${setup.runNumber}` },
    { label: when },
    recipeCrumb(setup.recipe),
  ];
}

function recipeCrumb({ recipeId, version, document }: NonNullable<RunState["setup"]>["recipe"]): Crumb {
  return {
    label: `${document.name}, version ${version}`,
    href: `/recipes/${encodeURIComponent(recipeId)}?version=${version}`,
  };
}
