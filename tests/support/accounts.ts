import { asc } from "drizzle-orm";
import type { Database } from "@/db/client";
import { outbox } from "@/db/schema/outbox";
import type { user } from "@/db/schema/user";
import { signIn } from "@/lib/server/accounts/sign-in";
import { hashPassword } from "@/lib/server/auth/password";
import { tokenHash } from "@/lib/server/auth/token";
import type { Context } from "@/lib/server/context/context";
import { makeUser, testContext } from "./test-database";

export const PASSWORD = "west of the breakwater";

/** An account that can sign in with PASSWORD. */
export async function makeAccount(
  db: Database,
  overrides: Partial<typeof user.$inferInsert> = {},
): Promise<typeof user.$inferSelect> {
  return makeUser(db, { passwordHash: await hashPassword(PASSWORD), ...overrides });
}

/** Signs an account in as its owner would. */
export async function signedIn(
  db: Database,
  email: string,
  options: { nowMs?: number; device?: string } = {},
): Promise<{ token: string; ctx: Context }> {
  const at = options.nowMs === undefined ? {} : { nowMs: options.nowMs };
  const { token, userId } = await signIn(
    testContext(db, at),
    { email, password: PASSWORD },
    options.device ?? "Firefox on Linux",
  );
  return { token, ctx: testContext(db, { userId, authSessionId: tokenHash(token), ...at }) };
}

/** All messages, oldest first. */
export async function letters(db: Database): Promise<(typeof outbox.$inferSelect)[]> {
  return db.read.select().from(outbox).orderBy(asc(outbox.createdAtMs), asc(outbox.id));
}

/** The token of the link in a message. */
export function tokenIn(body: string): string {
  const found = /token=([\w-]{43})/.exec(body)?.[1];
  if (found === undefined) throw new Error(`no link in: ${body}`);
  return found;
}
