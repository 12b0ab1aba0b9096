"use client";

import { useActionState } from "react";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function ConfirmForm({ act, token }: { act: Act; token: string }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Confirm your address" />
      <input type="hidden" name="token" value={token} />
      <SubmitButton busyText="Confirming" className="self-start">
        Confirm this address
      </SubmitButton>
    </form>
  );
}
