import type { Metadata } from "next";
import Link from "next/link";
import { redirect } from "next/navigation";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { currentUser } from "@/lib/server/auth/current-user";
import { localPath } from "@/lib/server/auth/local-path";
import { demoAccounts } from "@/lib/server/demo/accounts";
import { env } from "@/lib/server/env/env";
import { DemoAccounts } from "./_components/demo-accounts";
import { SignInForm } from "./_components/sign-in-form";
import { signInAction } from "./actions";

export const metadata: Metadata = { title: "Sign in" };

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function SignInPage({ searchParams }: Props) {
  const { next: wanted, done } = await searchParams;
  const next = localPath(wanted);
  if ((await currentUser()) !== null) redirect(next);
  return (
    <>
      <PageHeader title="Sign in" />
      {done === "confirmed" && (
        <Notice kind="done" className="mb-6 max-w-xl">
          Your e-mail address is confirmed. Sign in to go on.
        </Notice>
      )}
      <SignInForm act={signInAction} next={next} />
      <ul className="mt-6 flex flex-wrap gap-x-6">
        <li>
          <Link href="/forgotten-password" className="link inline-flex min-h-11 items-center">
            Forgotten the password?
          </Link>
        </li>
        <li>
          <Link href="/sign-up" className="link inline-flex min-h-11 items-center">
            Make an account
          </Link>
        </li>
      </ul>
      {env().demo && <DemoAccounts act={signInAction} accounts={demoAccounts} next={next} />}
    </>
  );
}
