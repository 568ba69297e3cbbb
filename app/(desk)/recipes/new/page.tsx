import type { Metadata } from "next";
import { RecipeEditor } from "@/components/recipe/recipe-editor";
import { emptyRecipeForm } from "@/components/recipe/recipe-form";
import { PageFrame } from "@/components/run-views/page-frame";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import { can } from "@/lib/auth/permissions";
import { requirePerson } from "@/lib/server/page-guard";
import { loadRegister } from "../load-recipe";

export const metadata: Metadata = { title: "New recipe" };

export default async function NewRecipePage() {
  const person = await requirePerson("recipe.write");
  return (
    <PageFrame>
      <div>
        <RecipeEditor
          heading={
            <>
              <Breadcrumb crumbs={[{ label: "Recipes", href: "/recipes" }, { label: "new" }]} />
              <h1 className="mt-0.5">Write a recipe</h1>
            </>
          }
          initial={emptyRecipeForm}
          version={1}
          register={await loadRegister()}
          mayRelease={can(person, "recipe.release")}
        />
      </div>
    </PageFrame>
  );
}
