import { and, eq, lt } from "drizzle-orm";
import { sessionOf, sessionsDeletedBefore } from "@/db/queries/session";
import { session } from "@/db/schema/session";
import { upload } from "@/db/schema/upload";
import type { Database } from "@/db/client";
import { AppError } from "@/lib/errors/app-error";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { removeUnneeded } from "@/lib/server/uploads/sweep-files";
import { NOT_IN_LOG, requireSession } from "./require-session";

/** A deleted session can be brought back for this long. */
export const RESTORE_DAYS = 30;
const DAY_MS = 86_400_000;

/**
 * Takes a session of the asker out of the log; `restoreSession` brings it back within 30 days.
 *
 * @throws AppError `unauthenticated`, `not_found`.
 */
export async function deleteSession(ctx: Context, sessionId: string): Promise<void> {
  const ownerId = requireUserId(ctx);
  await ctx.db.write(async (tx) => {
    await requireSession(tx, ownerId, sessionId);
    await tx
      .update(session)
      .set({ deletedAtMs: ctx.nowMs() })
      .where(and(eq(session.id, sessionId), eq(session.ownerId, ownerId)));
    await audit(tx, ctx, { action: "session.delete", subjectKind: "session", subjectId: sessionId });
  });
}

/**
 * Brings a deleted session of the asker back, as it was. Does nothing to one that is in the log.
 *
 * @throws AppError `unauthenticated`, `not_found`.
 */
export async function restoreSession(ctx: Context, sessionId: string): Promise<void> {
  const ownerId = requireUserId(ctx);
  await ctx.db.write(async (tx) => {
    const row = await sessionOf(tx, ownerId, sessionId);
    if (row === undefined) throw new AppError("not_found", NOT_IN_LOG);
    if (row.deletedAtMs === null) return;
    await tx
      .update(session)
      .set({ deletedAtMs: null })
      .where(and(eq(session.id, sessionId), eq(session.ownerId, ownerId)));
    await audit(tx, ctx, { action: "session.restore", subjectKind: "session", subjectId: sessionId });
  });
}

/**
 * Removes for good what was deleted more than 30 days ago: rows, and the raw file once no session of its upload is left.
 * Gives back how many sessions.
 */
export async function purgeDeletedSessions(db: Database, nowMs: number): Promise<number> {
  const beforeMs = nowMs - RESTORE_DAYS * DAY_MS;
  let purged = 0;
  for (const { id, uploadId } of await sessionsDeletedBefore(db.read, beforeMs)) {
    const sha256 = await db.write(async (tx) => {
      // Asked again inside the write: its rider may have brought it back since the list was read.
      const gone = await tx
        .delete(session)
        .where(and(eq(session.id, id), lt(session.deletedAtMs, beforeMs)))
        .returning({ id: session.id });
      if (gone.length === 0) return [];
      purged += 1;
      const left = await tx
        .select({ id: session.id })
        .from(session)
        .where(eq(session.uploadId, uploadId))
        .limit(1);
      if (left.length > 0) return [];
      return tx.delete(upload).where(eq(upload.id, uploadId)).returning({ sha256: upload.sha256 });
    });
    await removeUnneeded(
      db,
      sha256.map((row) => row.sha256),
    );
  }
  return purged;
}
