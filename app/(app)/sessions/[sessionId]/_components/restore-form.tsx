"use client";

import { useActionState, useEffect, useRef, useState, type ReactNode } from "react";
import { FormProblems } from "@/components/ui/form-problems";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { SubmitButton } from "@/components/ui/submit-button";
import { useLive } from "@/components/ui/use-live";
import { IDLE_FORM } from "@/lib/display/form-state";
import type { Act } from "./panel-form";

/** The notice of a deleted session with the button that brings it back. */
export function RestoreForm({
  act,
  sessionId,
  children,
}: {
  act: Act;
  sessionId: string;
  children: ReactNode;
}) {
  const [state, action] = useActionState(act, IDLE_FORM);
  const box = useRef<HTMLDivElement>(null);
  // True when the notice took the place of the session just now, and so of the button that had the focus.
  const live = useLive();
  const [isNews] = useState(live);
  useEffect(() => {
    if (isNews) box.current?.focus();
  }, [isNews]);
  return (
    <div ref={box} tabIndex={-1} className="mt-6 max-w-2xl">
      <Notice title="This session is deleted">
        <div>{children}</div>
        <form action={action} className="mt-4 flex flex-wrap items-center gap-4">
          <FormProblems state={state} />
          <input type="hidden" name="sessionId" value={sessionId} />
          <SubmitButton busyText="Bringing it back">Bring it back</SubmitButton>
          <LinkButton href="/sessions" look="quiet">
            To the log
          </LinkButton>
        </form>
      </Notice>
    </div>
  );
}
