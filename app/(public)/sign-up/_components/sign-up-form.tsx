"use client";

import { useActionState } from "react";
import { NumberField, PasswordField, TextField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function SignUpForm({ act }: { act: Act }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  const { values, fields } = state;
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Make an account" />
      <TextField
        name="name"
        label="Name"
        autoComplete="name"
        defaultValue={values.name}
        error={fields.name}
      />
      <TextField
        name="email"
        label="E-mail address"
        hint="You sign in with it. Nobody else sees it."
        type="email"
        autoComplete="email"
        autoCapitalize="off"
        spellCheck={false}
        defaultValue={values.email}
        error={fields.email}
      />
      <PasswordField
        name="password"
        label="Password"
        hint="At least 8 characters. A few words in a row work well; spaces count."
        autoComplete="new-password"
        error={fields.password}
      />
      <NumberField
        name="weight"
        label="Weight with gear"
        hint="Wetsuit, harness and helmet on. It tells how loaded a front wing is; you can add it later."
        unit="kg"
        optional
        defaultValue={values.weight}
        error={fields.weight}
      />
      <SubmitButton busyText="Making your account" className="self-start">
        Make an account
      </SubmitButton>
    </form>
  );
}
