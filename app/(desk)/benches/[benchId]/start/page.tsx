import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { PageFrame } from "@/components/run-views/page-frame";
import { StartForm } from "@/components/start/start-form";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import type { Unit } from "@/lib/schemas/instrument";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export const metadata: Metadata = { title: "Start a run" };

interface StartPageProps {
  params: Promise<{ benchId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function StartPage({ params, searchParams }: StartPageProps) {
  await requirePerson("run.start");
  const { benches, repositories } = getServices();
  const { benchId } = await params;
  const bench = (await repositories.benches.list()).find(({ id }) => id === benchId);
  if (!bench) notFound();
  const recipes = await repositories.recipes.listReleased();
  const { unit, recipe } = await searchParams;
  const given = { unit: await unitOf(unit), recipe: recipes.find((version) => isMeant(version, recipe)) ?? null };
  const snapshot = benches.snapshots().find(({ id }) => id === benchId) ?? null;
  return (
    <PageFrame>
      <div className="mx-auto w-full max-w-[1130px]">
        <Breadcrumb crumbs={[{ label: bench.name, href: "/benches" }, { label: "start a run" }]} />
        <h1 className="mt-0.5 mb-4">Is everything ready?</h1>
        <StartForm bench={bench} snapshot={snapshot} recipes={recipes} given={given} />
      </div>
    </PageFrame>
  );
}

/** The unit that a link names, without what only a simulation may know. */
async function unitOf(unitId: string | string[] | undefined): Promise<Unit | null> {
  const unit = typeof unitId === "string" ? await getServices().repositories.units.get(unitId) : null;
  return unit && { ...unit, simulation: null };
}

/** A link names a recipe or one version of it. */
function isMeant({ id, recipeId }: RecipeVersion, named: string | string[] | undefined): boolean {
  return named === id || named === recipeId;
}
