import { headers } from "next/headers";
import { newId } from "@/db/new-id";
import { readActor } from "@/lib/server/auth/read-actor";
import type { Context } from "@/lib/server/context/context";
import { database } from "@/lib/server/context/database";
import { env } from "@/lib/server/env/env";

/**
 * The client's address: the entry of X-Forwarded-For that the outermost trusted proxy wrote. With no trusted
 * proxy the header is a claim of the client itself and is not believed.
 */
export function clientAddress(forwardedFor: string | null, trustedHops: number): string | null {
  if (trustedHops === 0 || forwardedFor === null) return null;
  const chain = forwardedFor.split(",").map((part) => part.trim());
  return chain.at(-trustedHops) || null;
}

/** The context of the request being answered, for pages, actions and routes. */
export async function requestContext(): Promise<Context> {
  const list = await headers();
  return {
    db: database(),
    actor: await readActor(),
    nowMs: () => Date.now(),
    requestId: newId(),
    address: clientAddress(list.get("x-forwarded-for"), env().trustedProxyHops),
  };
}
