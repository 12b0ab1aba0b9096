"use client";

import { useActionState } from "react";
import { PasswordField, TextField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function EmailAddressForm({ act }: { act: Act }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="E-mail address" />
      <TextField
        name="email"
        label="New e-mail address"
        type="email"
        autoComplete="email"
        autoCapitalize="off"
        spellCheck={false}
        defaultValue={state.values.email}
        error={state.fields.email}
      />
      <PasswordField
        name="currentPassword"
        label="Your password"
        autoComplete="current-password"
        error={state.fields.currentPassword}
      />
      <SubmitButton busyText="Sending" className="self-start">
        Send a link to the new address
      </SubmitButton>
    </form>
  );
}
