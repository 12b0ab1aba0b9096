"use client";

import { useActionState } from "react";
import { FormProblems } from "@/components/ui/form-problems";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";
import { LocalTime } from "./local-time";

type Act = (state: FormState, form: FormData) => Promise<FormState>;
type SignIn = { id: string; device: string; createdAtMs: number; endsAtMs: number; isThisOne: boolean };

/** Where one is signed in; ending another one takes effect at its next page. */
export function SignInList({
  list,
  endOne,
  endOthers,
}: {
  list: readonly SignIn[];
  endOne: Act;
  endOthers: Act;
}) {
  const [one, oneAction] = useActionState(endOne, IDLE_FORM);
  const [others, othersAction] = useActionState(endOthers, IDLE_FORM);
  return (
    <div className="flex max-w-3xl flex-col gap-6">
      <FormProblems state={one} />
      <FormProblems state={others} />
      <ul className="rule-ink">
        {list.map((signIn) => (
          <li key={signIn.id} className="rule-hair flex flex-wrap items-center gap-x-6 gap-y-2 py-3">
            <div className="min-w-0 flex-1 basis-56">
              <p className="font-semibold">{signIn.device}</p>
              <p className="text-muted text-sm">
                Since <LocalTime timeMs={signIn.createdAtMs} />. Ends <LocalTime timeMs={signIn.endsAtMs} />{" "}
                if not used before.
              </p>
            </div>
            {signIn.isThisOne ? (
              <p className="border-buoy border-b-2 font-semibold">This device</p>
            ) : (
              <form action={oneAction}>
                <input type="hidden" name="id" value={signIn.id} />
                <SubmitButton look="plain" busyText="Ending">
                  End<span className="sr-only"> the sign-in of {signIn.device}</span>
                </SubmitButton>
              </form>
            )}
          </li>
        ))}
      </ul>
      {list.length > 1 && (
        <form action={othersAction}>
          <SubmitButton look="danger" busyText="Ending">
            End all the others
          </SubmitButton>
        </form>
      )}
    </div>
  );
}
