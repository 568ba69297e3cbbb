import type { Metadata } from "next";
import { RecipeEditor } from "@/components/recipe/recipe-editor";
import { recipeFormOf } from "@/components/recipe/recipe-form";
import { PageFrame } from "@/components/run-views/page-frame";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import { can } from "@/lib/auth/permissions";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { requirePerson } from "@/lib/server/page-guard";
import { loadRegister, loadVersions } from "../../load-recipe";

export const metadata: Metadata = { title: "Edit a recipe" };

export default async function EditRecipePage({ params }: { params: Promise<{ recipeId: string }> }) {
  const person = await requirePerson("recipe.write");
  const { recipeId } = await params;
  const versions = await loadVersions(recipeId);
  const [newest] = versions;
  const version = newest.state === "draft" ? newest.version : newest.version + 1;
  return (
    <PageFrame>
      <div>
        <RecipeEditor
          heading={
            <>
              <Breadcrumb
                crumbs={[
                  { label: "Recipes", href: "/recipes" },
                  { label: newest.document.name, href: `/recipes/${recipeId}` },
                  { label: `version ${version}, draft${releasedNote(versions)}` },
                ]}
              />
              <h1 className="mt-0.5">{newest.document.name}</h1>
            </>
          }
          recipeId={recipeId}
          initial={recipeFormOf(newest.document, newest.modelIds)}
          version={version}
          register={await loadRegister()}
          mayRelease={can(person, "recipe.release")}
        />
      </div>
    </PageFrame>
  );
}

function releasedNote(versions: readonly RecipeVersion[]): string {
  const released = versions.find(({ state }) => state === "released");
  return released ? ` · version ${released.version} is released` : "";
}
