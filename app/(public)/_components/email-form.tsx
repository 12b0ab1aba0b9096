"use client";

import { useActionState } from "react";
import { TextField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

export type EmailFormProps = {
  act: (state: FormState, form: FormData) => Promise<FormState>;
  /** The page's title, for the title of a refused form. */
  title: string;
  submit: string;
  busyText: string;
  look?: "main" | "plain";
};

/** Asks for an address to send a link to. */
export function EmailForm({ act, title, submit, busyText, look = "main" }: EmailFormProps) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title={title} />
      <TextField
        name="email"
        label="E-mail address"
        type="email"
        autoComplete="email"
        autoCapitalize="off"
        spellCheck={false}
        defaultValue={state.values.email}
        error={state.fields.email}
      />
      <SubmitButton busyText={busyText} look={look} className="self-start">
        {submit}
      </SubmitButton>
    </form>
  );
}
