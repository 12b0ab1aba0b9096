import { createHash } from "node:crypto";
import { and, eq, lte } from "drizzle-orm";
import type { Database, Transaction } from "@/db/client";
import { emailToken } from "@/db/schema/email-token";
import { user } from "@/db/schema/user";
import { AppError } from "@/lib/errors/app-error";
import { newToken, tokenHash } from "@/lib/server/auth/token";
import { verifyPassword } from "@/lib/server/auth/password";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import {
  forgetTurns,
  MAIL_PER_ADDRESS,
  MAIL_PER_RECIPIENT,
  REAUTHENTICATION,
  takeTurn,
  tooSoon,
  type ThrottleRule,
} from "@/lib/server/throttle/throttle";

export type UserRow = typeof user.$inferSelect;
type Purpose = (typeof emailToken.$inferSelect)["purpose"];

const HOUR_MS = 3_600_000;
const LIFE_MS: Readonly<Record<Purpose, number>> = {
  confirm_email: 24 * HOUR_MS,
  reset_password: HOUR_MS,
};

/** How the log names an address or an id: enough to follow one, not enough to know whose it is. */
export function logId(text: string): string {
  return createHash("sha256").update(text).digest("hex").slice(0, 16);
}

/** The account with an address, or null. */
export async function findByEmail(
  db: Database["read"] | Transaction,
  email: string,
): Promise<UserRow | null> {
  return (await db.select().from(user).where(eq(user.email, email)).limit(1))[0] ?? null;
}

/**
 * The account with an id.
 *
 * @throws AppError `unauthenticated` when it is gone.
 */
export async function fetchUser(db: Database["read"] | Transaction, id: string): Promise<UserRow> {
  const row = (await db.select().from(user).where(eq(user.id, id)).limit(1))[0];
  if (row === undefined) throw new AppError("unauthenticated", "Sign in to go on.");
  return row;
}

/** Makes a link's token; older links of the same purpose stop working. */
export async function issueEmailToken(
  tx: Transaction,
  link: { userId: string; purpose: Purpose; email: string; nowMs: number },
): Promise<string> {
  await dropEmailTokens(tx, link.userId, link.purpose);
  const token = newToken();
  await tx.insert(emailToken).values({
    id: tokenHash(token),
    userId: link.userId,
    purpose: link.purpose,
    email: link.email,
    expiresAtMs: link.nowMs + LIFE_MS[link.purpose],
  });
  return token;
}

/** Makes a person's links of one purpose useless. */
export async function dropEmailTokens(tx: Transaction, userId: string, purpose: Purpose): Promise<void> {
  await tx.delete(emailToken).where(and(eq(emailToken.userId, userId), eq(emailToken.purpose, purpose)));
}

const DEAD_LINK: Readonly<Record<Purpose, string>> = {
  confirm_email: "This link was used already, or it is older than 24 hours. Ask for a new one.",
  reset_password: "This link was used already, or it is older than 1 hour. Ask for a new one.",
};

/** The error for a link that opens nothing. */
export function deadLink(purpose: Purpose): AppError {
  return new AppError("precondition", DEAD_LINK[purpose]);
}

/** Looks a link up without using it. A link with more life than links get was made under a wrong clock. */
export async function findEmailToken(
  db: Database["read"] | Transaction,
  link: { token: string; purpose: Purpose; nowMs: number },
): Promise<typeof emailToken.$inferSelect | null> {
  const id = tokenHash(link.token);
  const row = (
    await db
      .select()
      .from(emailToken)
      .where(and(eq(emailToken.id, id), eq(emailToken.purpose, link.purpose)))
      .limit(1)
  )[0];
  if (row === undefined) return null;
  const lifeLeftMs = row.expiresAtMs - link.nowMs;
  const isAlive = lifeLeftMs > 0 && lifeLeftMs <= LIFE_MS[link.purpose] + 5 * 60_000;
  return isAlive ? row : null;
}

/**
 * Uses a link up.
 *
 * @throws AppError `precondition` when it was used, is too old or never existed.
 */
export async function consumeEmailToken(
  tx: Transaction,
  link: { token: string; purpose: Purpose; nowMs: number },
): Promise<typeof emailToken.$inferSelect> {
  const row = await findEmailToken(tx, link);
  if (row === null) throw deadLink(link.purpose);
  await tx.delete(emailToken).where(eq(emailToken.id, row.id));
  return row;
}

/**
 * Counts a message a stranger can set off, by mailbox and by where the request comes from.
 *
 * @throws AppError `limit_exceeded` when there were too many.
 */
export async function takeMailTurn(
  tx: Transaction,
  ctx: Context,
  email: string,
  perRecipient: ThrottleRule = MAIL_PER_RECIPIENT,
): Promise<void> {
  const waitMs = Math.max(
    await takeTurn(tx, MAIL_PER_ADDRESS, ctx.address, ctx.nowMs()),
    await takeTurn(tx, perRecipient, email, ctx.nowMs()),
  );
  if (waitMs > 0)
    throw tooSoon("Several messages were asked for already; look for them in the mailbox first.", waitMs);
}

/**
 * Checks the password of the person who is signed in, before a change that would let somebody else in. Guessing
 * is slowed as at sign-in, by a count of its own.
 *
 * @throws AppError `validation` on the given field, `limit_exceeded` after too many wrong ones.
 */
export async function reauthenticate(
  ctx: Context,
  row: UserRow,
  proof: { password: string; field: string },
): Promise<void> {
  const waitMs = await ctx.db.write((tx) => takeTurn(tx, REAUTHENTICATION, row.id, ctx.nowMs()));
  if (waitMs > 0) throw tooSoon("Too many wrong passwords in a row.", waitMs);
  if (!(await verifyPassword(row.passwordHash, proof.password))) {
    logEvent("warn", "reauthentication_refused", { account: logId(row.email), requestId: ctx.requestId });
    throw new AppError("validation", "This is not your password of today.", {
      fields: { [proof.field]: "This is not your password of today." },
    });
  }
  await ctx.db.write((tx) => forgetTurns(tx, REAUTHENTICATION, row.id));
}

/** Removes links that are over. Gives back how many. */
export async function sweepEmailTokens(db: Database, nowMs: number): Promise<number> {
  const rows = await db.write((tx) =>
    tx.delete(emailToken).where(lte(emailToken.expiresAtMs, nowMs)).returning({ id: emailToken.id }),
  );
  return rows.length;
}
