import { mkdir, readdir, readFile, rm } from "node:fs/promises";
import path from "node:path";
import type { Database } from "@/db/client";
import { logEvent } from "@/lib/server/context/log";

const KEEP = 5;
const PREFIX = "before-migration-";

/** How many migrations of the folder the database has not seen yet. */
export async function pendingMigrations(db: Database, root: string): Promise<number> {
  const journal: unknown = JSON.parse(
    await readFile(path.join(/* turbopackIgnore: true */ root, "drizzle", "meta", "_journal.json"), "utf8"),
  );
  const stamps = journalStamps(journal);
  if (!(await hasTable(db, "__drizzle_migrations"))) return stamps.length;
  const result = await db.client.execute("SELECT max(created_at) FROM __drizzle_migrations");
  const newest = Number(result.rows[0]?.[0] ?? 0);
  return stamps.filter((stamp) => stamp > newest).length;
}

function journalStamps(journal: unknown): number[] {
  if (typeof journal !== "object" || journal === null || !("entries" in journal)) return [];
  if (!Array.isArray(journal.entries)) return [];
  return journal.entries.map((entry: { when?: unknown }) => Number(entry.when)).filter(Number.isFinite);
}

async function hasTable(db: Database, name: string): Promise<boolean> {
  const result = await db.client.execute({
    sql: "SELECT count(*) FROM sqlite_master WHERE type = 'table' AND name = ?",
    args: [name],
  });
  return Number(result.rows[0]?.[0]) > 0;
}

/** Whether anybody has an account here: an empty database needs no copy. */
async function isInUse(db: Database): Promise<boolean> {
  if (!(await hasTable(db, "user"))) return false;
  return (await db.client.execute("SELECT 1 FROM user LIMIT 1")).rows.length > 0;
}

/**
 * Copies a database in use before migrations change it, checks the copy, and keeps the newest five. Gives back
 * the file's path, or null when there was nothing to do.
 *
 * @throws Error when the copy is not sound: then nothing may be migrated.
 */
export async function backUpBeforeMigration(
  db: Database,
  place: { root: string; dataDir: string; nowMs: number },
): Promise<string | null> {
  const pending = await pendingMigrations(db, place.root);
  if (pending === 0 || !(await isInUse(db))) return null;
  const folder = path.join(/* turbopackIgnore: true */ place.dataDir, "backups");
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const stamp = new Date(place.nowMs).toISOString().replace(/[-:.]/g, "");
  const file = path.join(folder, `${PREFIX}${stamp}.db`);
  await db.client.execute({ sql: "VACUUM INTO ?", args: [file] });
  await checkCopy(db, file);
  const old = (await readdir(folder))
    .filter((name) => name.startsWith(PREFIX) && name.endsWith(".db"))
    .sort()
    .slice(0, -KEEP);
  for (const name of old) await rm(path.join(folder, name), { force: true });
  logEvent("info", "backed_up", { pending, file: path.basename(file), removed: old.length });
  return file;
}

async function checkCopy(db: Database, file: string): Promise<void> {
  await db.client.execute({ sql: "ATTACH DATABASE ? AS copy", args: [file] });
  try {
    const result = await db.client.execute("PRAGMA copy.quick_check");
    const verdict = result.rows[0]?.[0];
    if (verdict !== "ok") throw new Error(`the backup before the migration is not sound: ${String(verdict)}`);
  } finally {
    await db.client.execute("DETACH DATABASE copy");
  }
}
