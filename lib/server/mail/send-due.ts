import { and, asc, eq, isNull, lt } from "drizzle-orm";
import type { Database } from "@/db/client";
import { outbox } from "@/db/schema/outbox";
import { logEvent } from "@/lib/server/context/log";

export type Letter = { readonly to: string; readonly subject: string; readonly text: string };
export type Send = (letter: Letter) => Promise<void>;

const MINUTE_MS = 60_000;
/** When each try is due, counted from the writing of the message: seven tries over a day. */
const DUE_AFTER_MS = [0, 1, 5, 30, 120, 480, 1440].map((minutes) => minutes * MINUTE_MS);
const BATCH = 20;

/** Whether a message is due. A message from the future (clock set back) is due at once. */
export function isDue(message: { attempts: number; createdAtMs: number }, nowMs: number): boolean {
  const waitMs = DUE_AFTER_MS[message.attempts];
  if (waitMs === undefined) return false;
  return message.createdAtMs > nowMs || message.createdAtMs + waitMs <= nowMs;
}

/**
 * Sends what is due and gives back how many went out. A try is counted before it is made: a process that dies in
 * the middle sends a message twice at worst, never for ever. What was sent keeps no text, for links are keys.
 */
export async function sendDue(db: Database, send: Send, nowMs: number): Promise<number> {
  const waiting = await db.read
    .select()
    .from(outbox)
    .where(and(isNull(outbox.sentAtMs), lt(outbox.attempts, DUE_AFTER_MS.length)))
    .orderBy(asc(outbox.createdAtMs));
  const due = waiting.filter((message) => isDue(message, nowMs)).slice(0, BATCH);
  let sent = 0;
  for (const message of due) {
    const attempts = message.attempts + 1;
    await db.write((tx) => tx.update(outbox).set({ attempts }).where(eq(outbox.id, message.id)));
    try {
      await send({ to: message.recipient, subject: message.subject, text: message.body });
    } catch (error) {
      const isLast = attempts >= DUE_AFTER_MS.length;
      const reason =
        error instanceof Error ? `${error.name}: ${"code" in error ? String(error.code) : "?"}` : "?";
      logEvent(isLast ? "error" : "warn", isLast ? "mail_given_up" : "mail_not_sent", {
        messageId: message.id,
        attempts,
        reason,
      });
      continue;
    }
    await db.write((tx) =>
      tx.update(outbox).set({ sentAtMs: nowMs, body: "" }).where(eq(outbox.id, message.id)),
    );
    logEvent("info", "mail_sent", { messageId: message.id, attempts });
    sent += 1;
  }
  return sent;
}

/** Messages older than a week go: sent ones have done their work, the links of the others are long dead. */
export async function sweepOutbox(db: Database, nowMs: number): Promise<number> {
  const rows = await db.write((tx) =>
    tx
      .delete(outbox)
      .where(lt(outbox.createdAtMs, nowMs - 7 * 1440 * MINUTE_MS))
      .returning({ id: outbox.id }),
  );
  return rows.length;
}
