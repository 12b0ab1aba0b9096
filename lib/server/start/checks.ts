import { open, rm, statfs } from "node:fs/promises";
import path from "node:path";
import type { Database } from "@/db/client";

/**
 * Whether the database file is whole: structure, and every reference leads somewhere.
 *
 * @throws Error that says what is broken: serving on a broken file makes it worse.
 */
export async function checkDatabase(db: Database): Promise<{ version: string }> {
  const quick = await db.client.execute("PRAGMA quick_check(1)");
  const verdict = quick.rows[0]?.[0];
  if (verdict !== "ok") throw new Error(`the database file is damaged: ${String(verdict)}`);
  const broken = await db.client.execute("PRAGMA foreign_key_check");
  if (broken.rows.length > 0) {
    const tables = [...new Set(broken.rows.map((row) => String(row[0])))].join(", ");
    throw new Error(`${broken.rows.length} rows refer to rows that are gone, in: ${tables}`);
  }
  const version = await db.client.execute("SELECT sqlite_version()");
  return { version: String(version.rows[0]?.[0]) };
}

/** Megabytes that may still be written to the disk of a folder. */
export async function freeDiskMb(folder: string): Promise<number> {
  const { bavail, bsize } = await statfs(folder);
  return Math.floor((Number(bavail) * Number(bsize)) / 1_048_576);
}

/**
 * Writes, flushes and removes a small file: permissions, a read-only mount and a full disk all show.
 *
 * @throws Error of the file system.
 */
export async function probeWrite(folder: string): Promise<void> {
  const file = path.join(/* turbopackIgnore: true */ folder, `.write-probe-${process.pid}`);
  try {
    const handle = await open(file, "w");
    try {
      await handle.writeFile("probe");
      await handle.sync();
    } finally {
      await handle.close();
    }
  } finally {
    await rm(file, { force: true });
  }
}
