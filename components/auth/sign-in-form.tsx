"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import { Note } from "@/components/ui/note";
import { api } from "@/lib/client/api";
import { signInSchema } from "@/lib/schemas/person";
import { DemoLine } from "./demo-line";
import type { DemoAccount } from "./demo-accounts";
import { enterSite, entranceFailure } from "./entrance";

interface SignInFormProps {
  /** Where to go afterwards: a path of this site. */
  next: string;
  demo: readonly DemoAccount[];
}

export function SignInForm({ next, demo }: SignInFormProps) {
  const form = useForm({ resolver: zodResolver(signInSchema), defaultValues: { email: "", password: "" } });
  const { register, handleSubmit, setValue, setFocus, formState } = form;
  const [failure, setFailure] = useState<string | null>(null);

  const submit = handleSubmit(async (credentials) => {
    setFailure(null);
    try {
      await api.signIn(credentials);
      enterSite(next);
    } catch (error) {
      setFailure(entranceFailure(error));
      setFocus("password", { shouldSelect: true });
    }
  });

  return (
    <>
      <form noValidate onSubmit={submit} className="grid gap-4.5">
        {failure && (
          <Note tone="bad" alert>
            {failure}
          </Note>
        )}
        <Field label="E-mail" error={formState.errors.email?.message}>
          <TextInput type="email" autoComplete="username" autoCapitalize="none" autoFocus {...register("email")} />
        </Field>
        <Field label="Password" error={formState.errors.password?.message}>
          <TextInput type="password" autoComplete="current-password" {...register("password")} />
        </Field>
        <Button
          variant="main"
          type="submit"
          busy={formState.isSubmitting || (formState.isSubmitSuccessful && failure === null)}
          className="max-sm:h-12"
        >
          Sign in
        </Button>
      </form>
      {demo.length > 0 && (
        <DemoLine
          accounts={demo}
          onChoose={(email) => {
            setValue("email", email, { shouldValidate: true });
            setFocus("password");
          }}
        />
      )}
    </>
  );
}
