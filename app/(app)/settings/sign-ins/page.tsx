import type { Metadata } from "next";
import { SettingsTabs } from "@/app/(app)/settings/_components/settings-tabs";
import { endOtherSignInsAction, endSignInAction } from "@/app/(app)/settings/actions";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { listSignIns, SIGN_IN_IDLE_DAYS } from "@/lib/server/accounts/list-sign-ins";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { SignInList } from "./_components/sign-in-list";

export const metadata: Metadata = { title: "Sign-ins" };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const DONE: Readonly<Record<string, string>> = {
  one: "That sign-in has ended.",
  others: "All other sign-ins have ended.",
  none: "There were no other sign-ins.",
};

export default async function SignInsPage({ searchParams }: Props) {
  const list = await pageRead("/settings/sign-ins", async () => listSignIns(await requestContext()));
  const { done } = await searchParams;
  const text = typeof done === "string" ? DONE[done] : undefined;
  return (
    <>
      <PageHeader
        title="Sign-ins"
        subtitle={`Where you are signed in. A sign-in that is not used for ${SIGN_IN_IDLE_DAYS} days ends by itself.`}
      />
      <SettingsTabs current="/settings/sign-ins" />
      {text !== undefined && (
        <Notice kind="done" className="mb-6 max-w-3xl">
          {text}
        </Notice>
      )}
      <SignInList list={list} endOne={endSignInAction} endOthers={endOtherSignInsAction} />
    </>
  );
}
