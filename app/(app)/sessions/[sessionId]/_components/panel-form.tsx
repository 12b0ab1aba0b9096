"use client";

import { useActionState, useMemo, type ReactNode } from "react";
import { Disclosure } from "@/components/ui/disclosure";
import { FormProblems } from "@/components/ui/form-problems";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

export type Act = (state: FormState, form: FormData) => Promise<FormState>;
export type PanelProps = {
  readonly act: Act;
  readonly sessionId: string;
  /** The fields as they are stored. */
  readonly initial: Readonly<Record<string, string>>;
};

type Shown = {
  /** What the fields hold: as stored, or as typed when the form was refused. */
  readonly values: Readonly<Record<string, string>>;
  readonly errorOf: (name: string) => string | undefined;
};

/**
 * One form of the session in its own fold. The fold stands open after an answer, so that the page shows it without JavaScript too;
 * the fields draw anew with new values, because the reset after an action goes back to what was drawn first.
 */
export function PanelForm(
  props: PanelProps & {
    summary: string;
    buttons: ReactNode;
    children: (shown: Shown) => ReactNode;
  },
) {
  const { act, sessionId, initial, summary, buttons, children } = props;
  const [state, action] = useActionState(act, IDLE_FORM);
  const values = state.status === "error" ? state.values : initial;
  const key = useMemo(() => JSON.stringify(values), [values]);
  return (
    <Disclosure summary={summary} open={state.status !== "idle"} className="rule-hair">
      <form action={action} noValidate className="flex max-w-2xl flex-col gap-6 pt-2">
        <FormProblems state={state} title={summary} />
        <input type="hidden" name="sessionId" value={sessionId} />
        <div key={key} className="flex flex-col gap-6">
          {children({ values, errorOf: (name) => state.fields[name] })}
        </div>
        <div className="flex flex-wrap gap-3">{buttons}</div>
      </form>
    </Disclosure>
  );
}
