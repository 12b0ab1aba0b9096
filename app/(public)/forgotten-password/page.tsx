import type { Metadata } from "next";
import { EmailForm } from "@/app/(public)/_components/email-form";
import { requestResetAction } from "@/app/(public)/_components/link-actions";
import { OutboxHint } from "@/app/(public)/_components/outbox-hint";
import { PageHeader } from "@/components/ui/page-header";

export const metadata: Metadata = { title: "Forgotten password" };

export default function ForgottenPasswordPage() {
  return (
    <>
      <PageHeader
        title="Forgotten password"
        subtitle="We send a link to your address; with it you choose a new password."
      />
      <EmailForm
        act={requestResetAction}
        title="Forgotten password"
        submit="Send the link"
        busyText="Sending"
      />
      <OutboxHint />
    </>
  );
}
