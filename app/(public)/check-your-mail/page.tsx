import type { Metadata } from "next";
import { EmailForm } from "@/app/(public)/_components/email-form";
import { resendConfirmationAction } from "@/app/(public)/_components/link-actions";
import { OutboxHint } from "@/app/(public)/_components/outbox-hint";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { Section } from "@/components/ui/section";

export const metadata: Metadata = { title: "Look in your mail" };

export default function CheckYourMailPage() {
  return (
    <>
      <PageHeader title="Look in your mail" />
      <div className="flex max-w-xl flex-col gap-4">
        <p>
          A message is on its way to the address you gave. Its link confirms that the address is yours; it
          works once, for 24 hours.
        </p>
        <p>You need not wait for it: sign in with your password and upload your first track.</p>
      </div>
      <LinkButton href="/sign-in" look="main" className="mt-6">
        Sign in
      </LinkButton>
      <OutboxHint />
      <Section
        id="again"
        title="Nothing came?"
        reading="Look among the unwanted mail too, then ask for another one."
      >
        <EmailForm
          act={resendConfirmationAction}
          title="Look in your mail"
          submit="Send the link again"
          busyText="Sending"
          look="plain"
        />
      </Section>
    </>
  );
}
