"use client";

import { useActionState, type ReactNode } from "react";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function ResendForm({ act, email, children }: { act: Act; email: string; children?: ReactNode }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} className="flex flex-wrap items-center gap-x-6 gap-y-1">
      <p className="min-w-0 break-words">
        Confirm <span className="font-semibold">{email}</span> by the link in your mail: without it a
        forgotten password cannot be set anew.
      </p>
      {state.status !== "ok" && (
        <SubmitButton look="quiet" size="small" busyText="Sending">
          Send the link again
        </SubmitButton>
      )}
      {children}
      <p
        role="status"
        className={state.status === "error" ? "text-buoy-text font-semibold" : "font-semibold"}
      >
        {state.message}
      </p>
    </form>
  );
}
