import { cookies } from "next/headers";
import { cache } from "react";
import type { Actor } from "@/lib/server/context/context";
import { database } from "@/lib/server/context/database";
import { SESSION_COOKIE } from "./session-cookie-name";
import { validateSignIn } from "./sign-ins";

/** Who holds the request's cookie. Asked once per request; a broken or ended sign-in is anonymous. */
export const readActor = cache(async (): Promise<Actor> => {
  const token = (await cookies()).get(SESSION_COOKIE)?.value;
  if (token === undefined) return { kind: "anonymous" };
  const found = await validateSignIn(database(), token, Date.now());
  return found === null ? { kind: "anonymous" } : { kind: "user", ...found };
});
