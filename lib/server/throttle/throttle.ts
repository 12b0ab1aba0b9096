import { createHash } from "node:crypto";
import { eq, lt } from "drizzle-orm";
import type { Database, Transaction } from "@/db/client";
import { throttle } from "@/db/schema/throttle";
import { AppError } from "@/lib/errors/app-error";

/**
 * How often something may happen. After `free` times within the window each further one has to wait: twice as
 * long every time from one second up to `waitMaxMs`, or, without `waitMaxMs`, until the window is over.
 */
export type ThrottleRule = {
  readonly name: string;
  readonly free: number;
  readonly windowMs: number;
  readonly waitMaxMs: number | null;
};

const SECOND_MS = 1000;
const MINUTE_MS = 60 * SECOND_MS;
const HOUR_MS = 60 * MINUTE_MS;

/**
 * Wrong passwords on one account. With waits of at most 64 s somebody guessing gets about 70 tries an hour, under
 * the ceiling of 100 (OWASP ASVS 4.0.3, 2.2.1), and the owner never waits longer than 64 s: nobody can be locked
 * out by somebody else's guessing.
 */
export const SIGN_IN_PER_ACCOUNT: ThrottleRule = {
  name: "sign_in_account",
  free: 5,
  windowMs: HOUR_MS,
  waitMaxMs: 64 * SECOND_MS,
};
/** Wrong passwords from one address, whatever the account. */
export const SIGN_IN_PER_ADDRESS: ThrottleRule = {
  name: "sign_in_address",
  free: 20,
  windowMs: 15 * MINUTE_MS,
  waitMaxMs: null,
};
/**
 * Wrong passwords of somebody who is signed in already. Counted apart from signing in, so that a stranger who guesses
 * there cannot keep the owner from changing the password. Both together stay under the ceiling of 100 an hour.
 */
export const REAUTHENTICATION: ThrottleRule = {
  name: "reauthentication",
  free: 5,
  windowMs: HOUR_MS,
  waitMaxMs: 5 * MINUTE_MS,
};
/** Messages to one mailbox that a stranger can set off: confirmations, sign-ups. */
export const MAIL_PER_RECIPIENT: ThrottleRule = {
  name: "mail_recipient",
  free: 5,
  windowMs: HOUR_MS,
  waitMaxMs: null,
};
/**
 * Links to set a new password, to one mailbox. Counted apart from other messages: a stranger who signs up again and
 * again with somebody's address must not block the way back in. Whoever is refused here got a link within the hour
 * that it lives, so the newest one still works.
 */
export const RESET_PER_RECIPIENT: ThrottleRule = {
  name: "reset_recipient",
  free: 5,
  windowMs: HOUR_MS,
  waitMaxMs: null,
};
/** Messages one address can set off. */
export const MAIL_PER_ADDRESS: ThrottleRule = {
  name: "mail_address",
  free: 20,
  windowMs: HOUR_MS,
  waitMaxMs: null,
};

/** The table's key: what is counted in clear, for whom only as a hash. */
export function throttleKey(rule: ThrottleRule, subject: string): string {
  return `${rule.name}:${createHash("sha256").update(`${rule.name}\n${subject}`).digest("hex").slice(0, 32)}`;
}

/** "8 seconds", "1 minute", "12 minutes": rounded up, so that waiting that long is enough. */
export function waitWords(waitMs: number): string {
  const seconds = Math.max(1, Math.ceil(waitMs / SECOND_MS));
  if (seconds < 100) return seconds === 1 ? "1 second" : `${seconds} seconds`;
  const minutes = Math.ceil(seconds / 60);
  return minutes === 1 ? "1 minute" : `${minutes} minutes`;
}

type Counter = { count: number; windowStartMs: number; blockedUntilMs: number };

/** The counter after one more time at `nowMs`; pure, so that the whole schedule can be tested with a made clock. */
export function countOnce(rule: ThrottleRule, before: Counter | null, nowMs: number): Counter {
  // A window that starts in the future was written under a clock that has been set back since.
  const isCurrent =
    before !== null && before.windowStartMs <= nowMs && nowMs < before.windowStartMs + rule.windowMs;
  const count = isCurrent ? before.count + 1 : 1;
  const windowStartMs = isCurrent ? before.windowStartMs : nowMs;
  if (count < rule.free) return { count, windowStartMs, blockedUntilMs: 0 };
  const waitMs =
    rule.waitMaxMs === null
      ? windowStartMs + rule.windowMs - nowMs
      : Math.min(SECOND_MS * 2 ** (count - rule.free), rule.waitMaxMs);
  return { count, windowStartMs, blockedUntilMs: nowMs + waitMs };
}

/**
 * Counts one more time in the given transaction, before the work it stands for, so that tries at the same moment
 * cannot slip past together. A time that has to wait is refused and does not count, so that hammering does not
 * make the wait longer. Gives back the milliseconds to wait, 0 when it may go on.
 */
export async function takeTurn(
  tx: Transaction,
  rule: ThrottleRule,
  subject: string | null,
  nowMs: number,
): Promise<number> {
  if (subject === null) return 0;
  const key = throttleKey(rule, subject);
  const before = (await tx.select().from(throttle).where(eq(throttle.key, key)).limit(1))[0] ?? null;
  const longestMs = rule.waitMaxMs ?? rule.windowMs;
  const waitMs = before === null ? 0 : before.blockedUntilMs - nowMs;
  // A wait longer than the rule knows comes from a clock that has been set back: it is not enforced.
  if (waitMs > 0 && waitMs <= longestMs) return waitMs;
  const after = countOnce(rule, before, nowMs);
  await tx
    .insert(throttle)
    .values({ key, ...after })
    .onConflictDoUpdate({ target: throttle.key, set: after });
  return 0;
}

/** Forgets what was counted: it was the right person after all. */
export async function forgetTurns(tx: Transaction, rule: ThrottleRule, subject: string): Promise<void> {
  await tx.delete(throttle).where(eq(throttle.key, throttleKey(rule, subject)));
}

/** Takes one counted time back, leaving the others. */
export async function giveTurnBack(
  tx: Transaction,
  rule: ThrottleRule,
  subject: string | null,
): Promise<void> {
  if (subject === null) return;
  const key = throttleKey(rule, subject);
  const row = (await tx.select().from(throttle).where(eq(throttle.key, key)).limit(1))[0];
  if (row === undefined) return;
  const count = Math.max(0, row.count - 1);
  await tx
    .update(throttle)
    .set({ count, blockedUntilMs: count < rule.free ? 0 : row.blockedUntilMs })
    .where(eq(throttle.key, key));
}

/** The refusal for a time that came too soon. */
export function tooSoon(what: string, waitMs: number): AppError {
  return new AppError("limit_exceeded", `${what} Wait ${waitWords(waitMs)}, then try again.`);
}

/** Removes counters whose window is long over. Gives back how many. */
export async function sweepThrottle(db: Database, nowMs: number): Promise<number> {
  const rows = await db.write((tx) =>
    tx
      .delete(throttle)
      .where(lt(throttle.windowStartMs, nowMs - 24 * HOUR_MS))
      .returning({ key: throttle.key }),
  );
  return rows.length;
}
