import { and, desc, eq, inArray, sql } from "drizzle-orm";
import type { Reader, Transaction } from "@/db/client";
import { session } from "@/db/schema/session";
import { upload } from "@/db/schema/upload";

export type UploadRow = typeof upload.$inferSelect;

type Handle = Reader | Transaction;

/** One upload of an owner, or undefined. */
export async function uploadOf(
  db: Handle,
  ownerId: string,
  uploadId: string,
): Promise<UploadRow | undefined> {
  const rows = await db
    .select()
    .from(upload)
    .where(and(eq(upload.id, uploadId), eq(upload.ownerId, ownerId)))
    .limit(1);
  return rows[0];
}

/** The owner's upload of exactly these bytes, or undefined. */
export async function uploadBySha256(
  db: Handle,
  ownerId: string,
  sha256: string,
): Promise<UploadRow | undefined> {
  const rows = await db
    .select()
    .from(upload)
    .where(and(eq(upload.ownerId, ownerId), eq(upload.sha256, sha256)))
    .limit(1);
  return rows[0];
}

/** Uploads of an owner whose bytes are safe but which have not been read yet, newest first. */
export async function waitingUploads(db: Handle, ownerId: string): Promise<UploadRow[]> {
  return db
    .select()
    .from(upload)
    .where(and(eq(upload.ownerId, ownerId), eq(upload.status, "stored")))
    .orderBy(desc(upload.createdAtMs))
    .limit(50);
}

/** Bytes an owner keeps in the store. */
export async function storedBytes(db: Handle, ownerId: string): Promise<number> {
  const rows = await db
    .select({ bytes: sql<number>`coalesce(sum(${upload.sizeBytes}), 0)` })
    .from(upload)
    .where(eq(upload.ownerId, ownerId));
  return rows[0]?.bytes ?? 0;
}

/** Which of these hashes any upload of anybody still needs. */
export async function neededSha256(db: Handle, sha256: readonly string[]): Promise<Set<string>> {
  if (sha256.length === 0) return new Set();
  const rows = await db
    .selectDistinct({ sha256: upload.sha256 })
    .from(upload)
    .where(inArray(upload.sha256, [...sha256]));
  return new Set(rows.map((row) => row.sha256));
}

/** The sessions an upload became, deleted ones too, in order of time. */
export async function sessionsOfUpload(db: Handle, ownerId: string, uploadId: string) {
  return db
    .select({
      id: session.id,
      entryName: session.entryName,
      title: session.title,
      startMs: session.startMs,
      timeZone: session.timeZone,
      deletedAtMs: session.deletedAtMs,
    })
    .from(session)
    .where(and(eq(session.ownerId, ownerId), eq(session.uploadId, uploadId)))
    .orderBy(session.startMs);
}
