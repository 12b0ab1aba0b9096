import type { Metadata } from "next";
import Link from "next/link";
import { redirect } from "next/navigation";
import { PageHeader } from "@/components/ui/page-header";
import { currentUser } from "@/lib/server/auth/current-user";
import { SignUpForm } from "./_components/sign-up-form";
import { signUpAction } from "./actions";

export const metadata: Metadata = { title: "Make an account" };

export default async function SignUpPage() {
  if ((await currentUser()) !== null) redirect("/sessions");
  return (
    <>
      <PageHeader
        title="Make an account"
        subtitle="Your sessions, your gear, your figures: only you see them."
      />
      <SignUpForm act={signUpAction} />
      <p className="mt-6">
        Here already?{" "}
        <Link href="/sign-in" className="link inline-flex min-h-11 items-center">
          Sign in
        </Link>
      </p>
    </>
  );
}
