import Link from "next/link";
import { formatDay } from "@/components/runs-list/format-day";
import { Panel } from "@/components/ui/panel";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { stateWords } from "./recipe-words";

interface VersionListProps {
  versions: readonly RecipeVersion[];
  /** Number of the version on the page. */
  shown: number;
}

/** All versions, newest first. */
export function VersionList({ versions, shown }: VersionListProps) {
  return (
    <Panel title="Versions" padding="flush">
      <ol className="text-small">
        {versions.map(({ id, recipeId, version, state, changedBy, changedAtMs }) => (
          <li key={id} className="border-b border-line last:border-0">
            <Link
              href={`/recipes/${recipeId}?version=${version}`}
              aria-current={version === shown ? "page" : undefined}
              className="flex flex-wrap gap-x-3 px-3.5 py-1.5 text-ink no-underline hover:bg-ground aria-current:bg-water-tint max-sm:py-3"
            >
              <b>Version {version}</b>
              <span>{stateWords[state].toLowerCase()}</span>
              <span className="ml-auto text-ink-2">
                {formatDay(changedAtMs)}, {changedBy}
              </span>
            </Link>
          </li>
        ))}
      </ol>
    </Panel>
  );
}
