import type { Metadata } from "next";
import { SettingsTabs } from "@/app/(app)/settings/_components/settings-tabs";
import { changePasswordAction } from "@/app/(app)/settings/actions";
import { PageHeader } from "@/components/ui/page-header";
import { requireUser } from "@/lib/server/auth/current-user";
import { PasswordForm } from "./_components/password-form";

export const metadata: Metadata = { title: "Password" };

export default async function PasswordPage() {
  const person = await requireUser("/settings/password");
  return (
    <>
      <PageHeader title="Password" />
      <SettingsTabs current="/settings/password" />
      <PasswordForm act={changePasswordAction} email={person.email} />
    </>
  );
}
