"use client";

import { useActionState } from "react";
import { Checkbox } from "@/components/ui/checkbox";
import { PasswordField } from "@/components/ui/fields";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

export function PasswordForm({ act, email }: { act: Act; email: string }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Password" />
      {/* Password managers file the new password under this name. */}
      <input type="text" name="username" autoComplete="username" defaultValue={email} hidden readOnly />
      <PasswordField
        name="currentPassword"
        label="Password of today"
        autoComplete="current-password"
        error={state.fields.currentPassword}
      />
      <PasswordField
        name="newPassword"
        label="New password"
        hint="At least 8 characters. A few words in a row work well; spaces count."
        autoComplete="new-password"
        error={state.fields.newPassword}
      />
      <Checkbox
        name="endOthers"
        value="1"
        defaultChecked
        label="Sign out every other device"
        hint="Whoever signed in with the old password has to know the new one."
      />
      <SubmitButton busyText="Changing" className="self-start">
        Change the password
      </SubmitButton>
    </form>
  );
}
