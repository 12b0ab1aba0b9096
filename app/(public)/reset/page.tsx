import type { Metadata } from "next";
import { Notice } from "@/components/ui/notice";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { isResetLinkAlive } from "@/lib/server/accounts/reset-password";
import { requestContext } from "@/lib/server/adapter/request-context";
import { ResetForm } from "./_components/reset-form";
import { resetPasswordAction } from "./actions";

const TITLE = "Set a new password";

export const metadata: Metadata = { title: TITLE, robots: { index: false } };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function ResetPage({ searchParams }: Props) {
  const { token } = await searchParams;
  if (typeof token === "string" && (await isResetLinkAlive(await requestContext(), token))) {
    return (
      <>
        <PageHeader title={TITLE} subtitle="Every other device is signed out when you do." />
        <ResetForm act={resetPasswordAction} token={token} />
      </>
    );
  }
  return (
    <>
      <PageHeader title="This link no longer works" />
      <Notice kind="info" className="mb-6 max-w-xl">
        It was used already, a newer one was sent, or it is older than 1 hour. Your password is as it was.
      </Notice>
      <LinkButton href="/forgotten-password" look="main">
        Ask for a new link
      </LinkButton>
    </>
  );
}
