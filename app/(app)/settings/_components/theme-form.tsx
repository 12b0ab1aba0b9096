"use client";

import { startTransition, useActionState } from "react";
import { ThemeSwitch, type ThemeChoice } from "@/components/shell/theme-switch";
import { FormProblems } from "@/components/ui/form-problems";
import { RadioGroup } from "@/components/ui/radio-group";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

const CHOICES = [
  { value: "system", label: "As the system" },
  { value: "light", label: "Light" },
  { value: "dark", label: "Dark" },
];

/** The switch shows and saves a choice at once; without JavaScript a plain form does the same. */
export function ThemeForm({ act, theme }: { act: Act; theme: ThemeChoice }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  const choose = (choice: ThemeChoice) => {
    const form = new FormData();
    form.set("theme", choice);
    startTransition(() => action(form));
  };
  return (
    <div className="flex max-w-xl flex-col gap-4">
      <ThemeSwitch initial={theme} onChosen={choose} />
      <FormProblems state={state} />
      <noscript>
        <form action={action} className="flex flex-col gap-4">
          <RadioGroup name="theme" legend="Colours" options={CHOICES} defaultValue={theme} inline />
          <SubmitButton className="self-start">Save colours</SubmitButton>
        </form>
      </noscript>
    </div>
  );
}
