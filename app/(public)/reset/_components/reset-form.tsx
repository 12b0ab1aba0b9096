"use client";

import { useActionState } from "react";
import { PasswordField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function ResetForm({ act, token }: { act: Act; token: string }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Set a new password" />
      <input type="hidden" name="token" value={token} />
      <PasswordField
        name="password"
        label="New password"
        hint="At least 8 characters. A few words in a row work well; spaces count."
        autoComplete="new-password"
        error={state.fields.password}
      />
      <SubmitButton busyText="Saving" className="self-start">
        Set this password and sign in
      </SubmitButton>
    </form>
  );
}
