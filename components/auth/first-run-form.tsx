"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import { Note } from "@/components/ui/note";
import { api } from "@/lib/client/api";
import { isApiError } from "@/lib/client/api-error";
import { firstRunSchema } from "@/lib/schemas/person";
import { enterSite, entranceFailure } from "./entrance";

const empty = { siteName: "", name: "", email: "", password: "" };

/** Names the site and makes its administrator, who is signed in afterwards. */
export function FirstRunForm() {
  const form = useForm({ resolver: zodResolver(firstRunSchema), defaultValues: empty });
  const { register, handleSubmit, setError, formState } = form;
  const { errors } = formState;
  const [failure, setFailure] = useState<string | null>(null);

  const submit = handleSubmit(async (answers) => {
    setFailure(null);
    try {
      await api.firstRun(answers);
      enterSite("/benches");
    } catch (error) {
      const problems = isApiError(error) ? error.problems : [];
      for (const { path, message } of problems) setError(path[0] as keyof typeof empty, { message });
      if (problems.length === 0) setFailure(entranceFailure(error));
    }
  });

  return (
    <form noValidate onSubmit={submit} className="grid gap-4.5">
      {failure && (
        <Note tone="bad" alert>
          {failure}
        </Note>
      )}
      <Field label="Site" hint="Stands at the top of every page and on reports." error={errors.siteName?.message}>
        <TextInput autoComplete="organization" autoFocus {...register("siteName")} />
      </Field>
      <Field label="Your name" hint="You become the administrator." error={errors.name?.message}>
        <TextInput autoComplete="name" {...register("name")} />
      </Field>
      <Field label="E-mail" error={errors.email?.message}>
        <TextInput type="email" autoComplete="username" autoCapitalize="none" {...register("email")} />
      </Field>
      <Field
        label="Password"
        hint="At least 12 characters; four plain words are easier to keep than a short riddle."
        error={errors.password?.message}
      >
        <TextInput type="password" autoComplete="new-password" {...register("password")} />
      </Field>
      <Button
        variant="main"
        type="submit"
        busy={formState.isSubmitting || (formState.isSubmitSuccessful && failure === null)}
        className="max-sm:h-12"
      >
        Set up this site
      </Button>
    </form>
  );
}
