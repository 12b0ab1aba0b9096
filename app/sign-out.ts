"use server";

import { redirect } from "next/navigation";
import { signOut } from "@/lib/server/accounts/sign-out";
import { requestContext } from "@/lib/server/adapter/request-context";
import { clearSessionCookie } from "@/lib/server/auth/session-cookie";

/** Ends the sign-in here and on the server, and drops what the browser kept of private pages. */
export async function signOutAction(): Promise<void> {
  await signOut(await requestContext());
  await clearSessionCookie();
  redirect("/");
}
