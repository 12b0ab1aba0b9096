"use client";

import { useActionState } from "react";
import { NumberField, TextField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function ProfileForm({ act, name, weight }: { act: Act; name: string; weight: string }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  const values = state.status === "error" ? state.values : { name, weight };
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Settings" />
      <TextField
        name="name"
        label="Name"
        autoComplete="name"
        defaultValue={values.name}
        error={state.fields.name}
      />
      <NumberField
        name="weight"
        label="Weight with gear"
        hint="Wetsuit, harness and helmet on. It tells how loaded a front wing is."
        unit="kg"
        optional
        defaultValue={values.weight}
        error={state.fields.weight}
      />
      <SubmitButton busyText="Saving" className="self-start">
        Save name and weight
      </SubmitButton>
    </form>
  );
}
