import type { Metadata } from "next";
import { EmailForm } from "@/app/(public)/_components/email-form";
import { resendConfirmationAction } from "@/app/(public)/_components/link-actions";
import { OutboxHint } from "@/app/(public)/_components/outbox-hint";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { isConfirmLinkAlive } from "@/lib/server/accounts/confirm-email";
import { requestContext } from "@/lib/server/adapter/request-context";
import { ConfirmForm } from "./_components/confirm-form";
import { confirmEmailAction } from "./actions";

const TITLE = "Confirm your address";

export const metadata: Metadata = { title: TITLE, robots: { index: false } };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function ConfirmPage({ searchParams }: Props) {
  const { token } = await searchParams;
  if (typeof token === "string" && (await isConfirmLinkAlive(await requestContext(), token))) {
    return (
      <>
        <PageHeader title={TITLE} subtitle="One press, and mail about your account can reach you." />
        <ConfirmForm act={confirmEmailAction} token={token} />
      </>
    );
  }
  return (
    <>
      <PageHeader title="This link no longer works" />
      <Notice kind="info" className="mb-6 max-w-xl">
        It was used already, a newer one was sent, or it is older than 24 hours. If your address is confirmed,
        there is nothing left to do; if not, ask for a new link.
      </Notice>
      <EmailForm act={resendConfirmationAction} title={TITLE} submit="Send a new link" busyText="Sending" />
      <OutboxHint />
    </>
  );
}
