import { and, asc, between, desc, eq, isNotNull, isNull, lt, ne } from "drizzle-orm";
import type { Reader, Transaction } from "@/db/client";
import { session } from "@/db/schema/session";
import { sessionFigures, WHOLE_SESSION } from "@/db/schema/session-figures";
import { track } from "@/db/schema/track";
import { upload } from "@/db/schema/upload";

export type SessionRow = typeof session.$inferSelect;
export type TrackRow = typeof track.$inferSelect;

type Handle = Reader | Transaction;

/** One session of an owner, deleted or not, or undefined. */
export async function sessionOf(
  db: Handle,
  ownerId: string,
  sessionId: string,
): Promise<SessionRow | undefined> {
  const rows = await db
    .select()
    .from(session)
    .where(and(eq(session.id, sessionId), eq(session.ownerId, ownerId)))
    .limit(1);
  return rows[0];
}

/** A session with the file it came from and its figures as a whole. */
export async function sessionWithFigures(db: Handle, ownerId: string, sessionId: string) {
  const rows = await db
    .select({
      session,
      figures: sessionFigures.figures,
      fileName: upload.fileName,
      sizeBytes: upload.sizeBytes,
      sha256: upload.sha256,
    })
    .from(session)
    .innerJoin(upload, eq(upload.id, session.uploadId))
    .innerJoin(
      sessionFigures,
      and(eq(sessionFigures.sessionId, session.id), eq(sessionFigures.spanId, WHOLE_SESSION)),
    )
    .where(and(eq(session.id, sessionId), eq(session.ownerId, ownerId)))
    .limit(1);
  return rows[0];
}

/** The analysed track of a session that is not deleted, or undefined. */
export async function trackOf(db: Handle, ownerId: string, sessionId: string) {
  const rows = await db
    .select({ track, version: session.analysisVersion })
    .from(track)
    .innerJoin(session, eq(session.id, track.sessionId))
    .where(and(eq(track.sessionId, sessionId), eq(track.ownerId, ownerId), isNull(session.deletedAtMs)))
    .limit(1);
  return rows[0];
}

/** The discipline of the session an owner added last, or undefined. */
export async function lastDisciplineOf(db: Handle, ownerId: string) {
  const rows = await db
    .select({ discipline: session.discipline })
    .from(session)
    .where(and(eq(session.ownerId, ownerId), isNull(session.deletedAtMs)))
    .orderBy(desc(session.createdAtMs), desc(session.id))
    .limit(1);
  return rows[0]?.discipline;
}

/** Found by its start on the water first: a scan over tracks would read every blob. */
const NEAR_MS = 60_000;

/** Another session of the owner whose recording begins and ends at the same times, within the tolerance, or undefined. */
export async function sameOutingOf(
  db: Handle,
  ownerId: string,
  of: { uploadId: string; startMs: number; firstFixMs: number; lastFixMs: number; toleranceMs: number },
): Promise<{ id: string; title: string } | undefined> {
  const near = await db
    .select({ id: session.id, title: session.title })
    .from(session)
    .where(
      and(
        eq(session.ownerId, ownerId),
        between(session.startMs, of.startMs - NEAR_MS, of.startMs + NEAR_MS),
        isNull(session.deletedAtMs),
        ne(session.uploadId, of.uploadId),
      ),
    )
    .limit(20);
  for (const one of near) {
    const ends = await db
      .select({ firstFixMs: track.firstFixMs, lastFixMs: track.lastFixMs })
      .from(track)
      .where(eq(track.sessionId, one.id));
    const isSame = ends.some(
      ({ firstFixMs, lastFixMs }) =>
        Math.abs(firstFixMs - of.firstFixMs) <= of.toleranceMs &&
        Math.abs(lastFixMs - of.lastFixMs) <= of.toleranceMs,
    );
    if (isSame) return one;
  }
  return undefined;
}

/** The title of every session of an owner that is not their own wording, with where it began and ended. */
export async function sessionsTitledByPlace(db: Handle, ownerId: string): Promise<SessionRow[]> {
  return db
    .select()
    .from(session)
    .where(and(eq(session.ownerId, ownerId), eq(session.titleIsOwn, false)));
}

/** Sessions of all owners whose time to be brought back is over. */
export async function sessionsDeletedBefore(db: Handle, timeMs: number) {
  return db
    .select({ id: session.id, uploadId: session.uploadId })
    .from(session)
    .where(and(isNotNull(session.deletedAtMs), lt(session.deletedAtMs, timeMs)))
    .orderBy(asc(session.deletedAtMs))
    .limit(500);
}

/** Sessions of all owners that an older analysis made. */
export async function sessionsOfOlderAnalysis(db: Handle, version: number) {
  return db
    .select({ id: session.id, ownerId: session.ownerId })
    .from(session)
    .where(lt(session.analysisVersion, version))
    .orderBy(asc(session.id));
}
