import { cookies } from "next/headers";
import { cache } from "react";
import type { Actor } from "@/lib/server/context/context";
import { lucia, SESSION_COOKIE } from "./lucia";
import { tokenHash } from "./token";

/** Who holds the request's cookie. Asked once per request; a broken or ended sign-in is anonymous. */
export const readActor = cache(async (): Promise<Actor> => {
  const token = (await cookies()).get(SESSION_COOKIE)?.value;
  if (token === undefined || token.length > 100) return { kind: "anonymous" };
  const { session } = await lucia().validateSession(tokenHash(token));
  if (session === null) return { kind: "anonymous" };
  if (session.absoluteEndMs <= Date.now()) {
    await lucia().invalidateSession(session.id);
    return { kind: "anonymous" };
  }
  return { kind: "user", userId: session.userId, authSessionId: session.id };
});
