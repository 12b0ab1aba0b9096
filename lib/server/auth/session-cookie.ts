import { cookies } from "next/headers";
import { database } from "@/lib/server/context/database";
import { ABSOLUTE_DAYS, lucia } from "./lucia";

/** What the browser is told about the cookie; the table decides when a sign-in is over. */
export function cookieAttributes() {
  return {
    httpOnly: true,
    secure: true,
    sameSite: "lax" as const,
    path: "/",
    maxAge: ABSOLUTE_DAYS * 86_400,
  };
}

/** Hands the token of a new sign-in to the browser. In actions and routes only. */
export async function setSessionCookie(token: string): Promise<void> {
  const cookie = lucia(database()).createSessionCookie(token);
  (await cookies()).set(cookie.name, cookie.value, { ...cookie.attributes, ...cookieAttributes() });
}

/** Takes the cookie away. In actions and routes only. */
export async function clearSessionCookie(): Promise<void> {
  const cookie = lucia(database()).createBlankSessionCookie();
  (await cookies()).set(cookie.name, cookie.value, {
    ...cookie.attributes,
    ...cookieAttributes(),
    maxAge: 0,
  });
}
