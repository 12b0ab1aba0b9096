import { and, eq, lt, notExists, sql } from "drizzle-orm";
import type { Database } from "@/db/client";
import { neededSha256 } from "@/db/queries/upload";
import { session } from "@/db/schema/session";
import { upload } from "@/db/schema/upload";
import { storage } from "@/lib/server/storage/storage";

const BATCH = 200;
/** A refused file stays this long for whoever wants to find out why; then it stops counting against the quota. */
const REFUSED_DAYS = 30;
const DAY_MS = 86_400_000;

/**
 * Clears what an earlier process left when it died: half-written temporary files, and kept bytes whose row was never
 * committed. Only files older than `startedMs` are looked at, so uploads of this process are safe. Run it once at start.
 */
export async function sweepOrphans(
  db: Database,
  startedMs: number,
): Promise<{ temporary: number; orphans: number }> {
  const temporary = await storage().clearTemporary(startedMs);
  let orphans = 0;
  let batch: string[] = [];
  for await (const sha256 of storage().listOlderThan(startedMs)) {
    batch.push(sha256);
    if (batch.length < BATCH) continue;
    orphans += await removeUnneeded(db, batch);
    batch = [];
  }
  return { temporary, orphans: orphans + (await removeUnneeded(db, batch)) };
}

/**
 * Removes bytes that no upload of anybody names any more. In a turn of the write queue, as keeping a file is: nobody can
 * send the same bytes in between.
 */
export async function removeUnneeded(db: Database, sha256: readonly string[]): Promise<number> {
  return db.write(async (tx) => {
    const needed = await neededSha256(tx, sha256);
    const orphans = sha256.filter((one) => !needed.has(one));
    for (const one of orphans) await storage().remove(one);
    return orphans.length;
  });
}

/** Removes uploads that gave no session and are old. Gives back how many. */
export async function sweepRefusedUploads(db: Database, nowMs: number): Promise<number> {
  const gone = await db.write((tx) =>
    tx
      .delete(upload)
      .where(
        and(
          eq(upload.status, "done"),
          lt(upload.createdAtMs, nowMs - REFUSED_DAYS * DAY_MS),
          notExists(
            tx
              .select({ one: sql`1` })
              .from(session)
              .where(eq(session.uploadId, upload.id)),
          ),
        ),
      )
      .returning({ sha256: upload.sha256 }),
  );
  await removeUnneeded(
    db,
    gone.map((row) => row.sha256),
  );
  return gone.length;
}
