"use client";

import { useActionState } from "react";
import { FormProblems } from "@/components/ui/form-problems";
import { Section } from "@/components/ui/section";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;
type Account = { name: string; email: string; password: string; role: string };

/** The invented people of the demo; one press signs in as one of them. */
export function DemoAccounts({
  act,
  accounts,
  next,
}: {
  act: Act;
  accounts: readonly Account[];
  next: string;
}) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <Section id="demo-accounts" title="Demo accounts" reading="Invented people of an invented club.">
      <FormProblems state={state} />
      <ul className="rule-ink">
        {accounts.map((account) => (
          <li key={account.email} className="rule-hair flex flex-wrap items-center gap-x-6 gap-y-2 py-3">
            <div className="min-w-0 flex-1 basis-64">
              <p>
                <span className="font-semibold">{account.name}</span>
                <span className="text-muted">, {account.role.toLowerCase()}</span>
              </p>
              <p className="num text-muted flex flex-wrap gap-x-4 text-sm break-all">
                <span>{account.email}</span>
                <span>{account.password}</span>
              </p>
            </div>
            <form action={action}>
              <input type="hidden" name="email" value={account.email} />
              <input type="hidden" name="password" value={account.password} />
              <input type="hidden" name="next" value={next} />
              <SubmitButton look="plain" busyText="Signing in">
                Sign in as {account.name.split(" ")[0]}
              </SubmitButton>
            </form>
          </li>
        ))}
      </ul>
    </Section>
  );
}
