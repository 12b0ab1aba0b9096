import { resendToMeAction } from "./resend-to-me";
import { ResendForm } from "./resend-form";
import { OutboxHint } from "@/app/(public)/_components/outbox-hint";
import { currentUser } from "@/lib/server/auth/current-user";

/** Stands above every page until the address is confirmed: without it a lost password cannot be set anew. */
export async function ConfirmNotice() {
  const person = await currentUser();
  if (person === null || person.emailConfirmed) return null;
  return (
    <aside aria-label="Your e-mail address" className="rule-hair no-print py-3 text-sm">
      <ResendForm act={resendToMeAction} email={person.email}>
        <OutboxHint className="" />
      </ResendForm>
    </aside>
  );
}
