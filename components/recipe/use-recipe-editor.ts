import { useMutation } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useEffect, useMemo, useState } from "react";
import { api } from "@/lib/client/api";
import { failureMessage, isApiError } from "@/lib/client/api-error";
import type { Bench } from "@/lib/schemas/bench";
import type { Standard, UnitModel } from "@/lib/schemas/instrument";
import { fieldProblems, parseRecipeForm, type FieldProblems } from "./parse-recipe-form";
import type { RecipeForm } from "./recipe-form";

export interface RecipeRegister {
  models: readonly UnitModel[];
  standards: readonly Standard[];
  benches: readonly Bench[];
}

interface EditorInput {
  /** Absent for a new recipe. */
  recipeId?: string | undefined;
  initial: RecipeForm;
  register: RecipeRegister;
}

/** A recipe being written: its form, what is wrong with it, and the way to store it. */
export function useRecipeEditor({ recipeId, initial, register }: EditorInput) {
  const router = useRouter();
  const [form, setForm] = useState(initial);
  const [isAsked, setIsAsked] = useState(false);
  const { models, standards } = register;
  const parsed = useMemo(() => {
    const chosen = models.filter(({ id }) => form.modelIds.includes(id));
    return parseRecipeForm(form, { models: chosen, standards });
  }, [form, models, standards]);
  const hasProblems = Object.keys(parsed.problems).length > 0;

  const save = useMutation({
    mutationFn: ({ release }: { release: boolean }) =>
      api.saveRecipe({ document: parsed.document!, modelIds: [...form.modelIds], release }, recipeId),
    onSuccess: (saved) => {
      router.push(`/recipes/${saved.recipeId}?version=${saved.version}`);
      router.refresh();
    },
  });
  const isDirty = form !== initial && !save.isSuccess;
  useLeaveWarning(isDirty);

  return {
    ...{ form, parsed, isDirty, models },
    change: (part: Partial<RecipeForm>) => {
      setForm((known) => ({ ...known, ...part }));
      save.reset();
    },
    replace: (next: (known: RecipeForm) => RecipeForm) => {
      setForm(next);
      save.reset();
    },
    /** What stands at the fields: lists and bounds at once, what is merely empty after the first try to store. */
    problems: shownProblems({ isAsked, form, found: parsed.problems, error: save.error }),
    failure: save.error && !isAtFields(save.error) ? failureMessage(save.error) : null,
    isSaving: save.isPending || save.isSuccess,
    /** Whether it may be stored; from now on every problem is shown. */
    ask: () => {
      setIsAsked(true);
      return !hasProblems;
    },
    save: (release: boolean) => save.mutate({ release }),
  };
}

function isAtFields(error: Error): boolean {
  return isApiError(error) && error.problems.length > 0;
}

interface Shown {
  isAsked: boolean;
  form: RecipeForm;
  found: FieldProblems;
  error: Error | null;
}

function shownProblems({ isAsked, form, found, error }: Shown): FieldProblems {
  if (isApiError(error) && error.problems.length > 0) return fieldProblems(error.problems);
  if (isAsked) return found;
  const { name, resistances, voltages, ...rest } = found;
  return {
    ...rest,
    ...(form.name !== "" && name ? { name } : {}),
    ...(form.resistances.trim() !== "" && resistances ? { resistances } : {}),
    ...(form.voltages.trim() !== "" && voltages ? { voltages } : {}),
  };
}

/** The browser asks before unsaved work is left behind. */
function useLeaveWarning(isDirty: boolean): void {
  useEffect(() => {
    if (!isDirty) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener("beforeunload", warn);
    return () => window.removeEventListener("beforeunload", warn);
  }, [isDirty]);
}
