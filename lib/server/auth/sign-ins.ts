import { and, eq, gt, lte, ne, or, type SQL } from "drizzle-orm";
import type { Database, Transaction } from "@/db/client";
import { authSession } from "@/db/schema/auth-session";
import { logEvent } from "@/lib/server/context/log";
import { ABSOLUTE_DAYS, adapterOn, IDLE_DAYS, lucia } from "./lucia";
import { newToken, tokenHash } from "./token";

const DAY_MS = 86_400_000;
/** How far two looks at the clock may disagree (time service corrections) before it counts as set back. */
export const CLOCK_SLACK_MS = 5 * 60_000;
const TOKEN_LENGTH = 43;

/** Starts a sign-in within the change that grants it. The token goes into the cookie and nowhere else. */
export async function startSignIn(
  tx: Transaction,
  options: { userId: string; device: string; nowMs: number },
): Promise<string> {
  const token = newToken();
  await adapterOn(tx).setSession({
    id: tokenHash(token),
    userId: options.userId,
    expiresAt: new Date(options.nowMs + IDLE_DAYS * DAY_MS),
    attributes: {
      absoluteEndMs: options.nowMs + ABSOLUTE_DAYS * DAY_MS,
      createdAtMs: options.nowMs,
      device: options.device.slice(0, 100),
    },
  });
  return token;
}

/** Ends all sign-ins of a person, or all but one. Gives back how many ended. */
export async function endSignIns(tx: Transaction, userId: string, exceptId: string | null): Promise<number> {
  const scope: SQL | undefined =
    exceptId === null
      ? eq(authSession.userId, userId)
      : and(eq(authSession.userId, userId), ne(authSession.id, exceptId));
  const ended = await tx.delete(authSession).where(scope).returning({ id: authSession.id });
  return ended.length;
}

/**
 * Whose sign-in a cookie's token is, or null. A sign-in is over when it was unused for 14 days, is 90 days old,
 * or reaches further than the clock allows: it was begun or extended in what is now the future, so the clock has
 * been set back, and believing it would let it live on past its time.
 */
export async function validateSignIn(
  db: Database,
  token: string,
  nowMs: number,
): Promise<{ userId: string; authSessionId: string } | null> {
  if (token.length !== TOKEN_LENGTH) return null;
  const id = tokenHash(token);
  const row = (await db.read.select().from(authSession).where(eq(authSession.id, id)).limit(1))[0];
  if (row === undefined) return null;
  const latestMs = nowMs + CLOCK_SLACK_MS;
  const isOver = row.expiresAt * 1000 <= nowMs || row.absoluteEndMs <= nowMs;
  const isFromTheFuture = row.createdAtMs > latestMs || row.expiresAt * 1000 > latestMs + IDLE_DAYS * DAY_MS;
  if (isOver || isFromTheFuture) {
    await lucia(db).invalidateSession(id);
    logEvent("info", "sign_in_ended", {
      signIn: id.slice(0, 16),
      userId: row.userId,
      isOver,
      isFromTheFuture,
    });
    return null;
  }
  const { session } = await lucia(db).validateSession(id);
  return session === null ? null : { userId: session.userId, authSessionId: session.id };
}

/** Removes sign-ins that are over. Gives back how many. */
export async function sweepSignIns(db: Database, nowMs: number): Promise<number> {
  const over = or(
    lte(authSession.expiresAt, Math.floor(nowMs / 1000)),
    lte(authSession.absoluteEndMs, nowMs),
    gt(authSession.createdAtMs, nowMs + CLOCK_SLACK_MS),
  );
  const rows = await db.write((tx) => tx.delete(authSession).where(over).returning({ id: authSession.id }));
  return rows.length;
}
