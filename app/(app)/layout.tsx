import { headers } from "next/headers";
import { redirect } from "next/navigation";
import type { ReactNode } from "react";
import { Frame } from "@/app/frame";
import { currentUser } from "@/lib/server/auth/current-user";
import { ConfirmNotice } from "./_components/confirm-notice";

/** Nobody sees these pages signed out. What a person may see of them is decided by the verbs, not here. */
export default async function AppLayout({ children }: { children: ReactNode }) {
  if ((await currentUser()) === null) {
    const path = (await headers()).get("x-path") ?? "/sessions";
    redirect(`/sign-in?next=${encodeURIComponent(path)}`);
  }
  return (
    <Frame>
      <ConfirmNotice />
      {children}
    </Frame>
  );
}
