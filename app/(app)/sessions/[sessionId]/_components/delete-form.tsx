"use client";

import { useActionState } from "react";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM } from "@/lib/display/form-state";
import type { Act } from "./panel-form";

/** One press deletes; no question first, because the page then brings it back with one button. */
export function DeleteForm({ act, sessionId, days }: { act: Act; sessionId: string; days: number }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} className="flex flex-wrap items-center gap-x-3 gap-y-1">
      <FormProblems state={state} />
      <input type="hidden" name="sessionId" value={sessionId} />
      <SubmitButton look="danger" busyText="Deleting" aria-describedby="delete-way-back">
        Delete
      </SubmitButton>
      <span id="delete-way-back" className="text-muted text-sm">
        can be brought back for {days} days
      </span>
    </form>
  );
}
