import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { RecipeView } from "@/components/recipe/recipe-view";
import { stateWords } from "@/components/recipe/recipe-words";
import { VersionList } from "@/components/recipe/version-list";
import { PageFrame } from "@/components/run-views/page-frame";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import { Button } from "@/components/ui/button";
import { can } from "@/lib/auth/permissions";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { requirePerson } from "@/lib/server/page-guard";
import { loadRegister, loadVersions } from "../load-recipe";

export const metadata: Metadata = { title: "Recipe" };

interface RecipePageProps {
  params: Promise<{ recipeId: string }>;
  searchParams: Promise<{ version?: string | string[] }>;
}

export default async function RecipePage({ params, searchParams }: RecipePageProps) {
  const person = await requirePerson("recipe.read");
  const { recipeId } = await params;
  const versions = await loadVersions(recipeId);
  const recipe = shownVersion(versions, (await searchParams).version);
  if (!recipe) notFound();
  const { models, benches } = await loadRegister();
  const newest = versions[0];
  return (
    <PageFrame>
      <div>
        <div className="flex flex-wrap items-start gap-x-4 gap-y-3">
          <div className="min-w-0 flex-1 max-sm:basis-full">
            <Breadcrumb crumbs={[{ label: "Recipes", href: "/recipes" }, { label: whichVersion(recipe, versions) }]} />
            <h1 className="mt-0.5">{recipe.document.name}</h1>
            {recipe.document.purpose && <p className="mt-1 max-w-prose text-ink-2">{recipe.document.purpose}</p>}
          </div>
          {can(person, "recipe.write") && (
            <Button href={`/recipes/${recipeId}/edit`}>
              {newest.state === "draft"
                ? `Edit the draft, version ${newest.version}`
                : `Edit as version ${newest.version + 1}`}
            </Button>
          )}
        </div>
        {recipe.state === "released" && can(person, "run.start") && (
          <nav aria-label="Start a run with it" className="mt-3 flex flex-wrap items-center gap-2">
            <span className="text-small text-ink-2">Start a run with it on</span>
            {benches.map(({ id, name }) => (
              <Button key={id} size="small" href={`/benches/${id}/start?recipe=${recipe.id}`}>
                {name}
              </Button>
            ))}
          </nav>
        )}
        <div className="mt-4">
          <RecipeView recipe={recipe} benches={benches} models={models}>
            <VersionList versions={versions} shown={recipe.version} />
          </RecipeView>
        </div>
      </div>
    </PageFrame>
  );
}

/** The version that the URL names; without one the newest released, else the newest. */
function shownVersion(
  versions: readonly RecipeVersion[],
  named: string | string[] | undefined,
): RecipeVersion | undefined {
  if (named !== undefined) return versions.find(({ version }) => String(version) === named);
  return versions.find(({ state }) => state === "released") ?? versions[0];
}

/** `version 4, released`, and what the newest one is when this is an earlier one. */
function whichVersion({ version, state }: RecipeVersion, versions: readonly RecipeVersion[]): string {
  const newest = versions[0]!;
  const here = `version ${version}, ${stateWords[state].toLowerCase()}`;
  if (newest.version === version) return here;
  return `${here} · version ${newest.version} is ${newest.state === "draft" ? "a draft" : stateWords[newest.state].toLowerCase()}`;
}
