import type { Metadata } from "next";
import { OutboxHint } from "@/app/(public)/_components/outbox-hint";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Section } from "@/components/ui/section";
import { SettingsTabs } from "@/app/(app)/settings/_components/settings-tabs";
import { changeEmailAction } from "@/app/(app)/settings/actions";
import { requireUser } from "@/lib/server/auth/current-user";
import { EmailAddressForm } from "./_components/email-address-form";

export const metadata: Metadata = { title: "E-mail address" };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function EmailPage({ searchParams }: Props) {
  const person = await requireUser("/settings/email");
  const { done } = await searchParams;
  return (
    <>
      <PageHeader title="E-mail address" />
      <SettingsTabs current="/settings/email" />
      {done === "confirmed" && person.emailConfirmed && (
        <Notice kind="done" className="mb-6 max-w-xl">
          Your e-mail address is confirmed.
        </Notice>
      )}
      <p className="max-w-xl break-words">
        Your address is <span className="font-semibold">{person.email}</span>,{" "}
        {person.emailConfirmed ? "confirmed" : "not confirmed yet"}.
      </p>
      <Section
        id="change"
        title="Change it"
        reading="The new address counts once you use the link we send there."
      >
        <EmailAddressForm act={changeEmailAction} />
      </Section>
      <OutboxHint />
    </>
  );
}
