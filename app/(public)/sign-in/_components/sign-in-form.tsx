"use client";

import { useActionState } from "react";
import { PasswordField, TextField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function SignInForm({ act, next }: { act: Act; next: string }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Sign in" />
      <input type="hidden" name="next" value={next} />
      <TextField
        name="email"
        label="E-mail address"
        type="email"
        autoComplete="username"
        autoCapitalize="off"
        spellCheck={false}
        defaultValue={state.values.email}
        error={state.fields.email}
      />
      <PasswordField
        name="password"
        label="Password"
        autoComplete="current-password"
        error={state.fields.password}
      />
      <SubmitButton busyText="Signing in" className="self-start">
        Sign in
      </SubmitButton>
    </form>
  );
}
