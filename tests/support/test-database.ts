import { createHash } from "node:crypto";
import { existsSync } from "node:fs";
import { copyFile, mkdir, mkdtemp, readdir, readFile, rename, rm } from "node:fs/promises";
import os from "node:os";
import path from "node:path";
import { openDatabase, prepareDatabase, type Database } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { newId } from "@/db/new-id";
import { user } from "@/db/schema/user";
import { at } from "@/lib/errors/invariant";
import type { Context } from "@/lib/server/context/context";

const ROOT = path.resolve(import.meta.dirname, "../..");

/** Sat 14 Jun 2025, 12:00 UTC: where the clock of tests stands unless told otherwise. */
export const TEST_NOW_MS = Date.UTC(2025, 5, 14, 12);

/** One migrated file for each state of the migrations, made once and then only copied. */
async function migratedBase(): Promise<string> {
  const hash = createHash("sha256");
  for (const name of (await readdir(path.join(ROOT, "drizzle"))).filter((n) => n.endsWith(".sql")).sort()) {
    hash.update(name).update(await readFile(path.join(ROOT, "drizzle", name)));
  }
  hash.update(await readFile(path.join(ROOT, "drizzle", "meta", "_journal.json")));
  const folder = path.join(os.tmpdir(), "trimwake-tests");
  await mkdir(folder, { recursive: true });
  const base = path.join(folder, `base-${hash.digest("hex").slice(0, 16)}.db`);
  if (existsSync(base)) return base;
  const scratch = await mkdtemp(path.join(folder, "base-"));
  const url = `file:${path.join(scratch, "base.db")}`;
  const database = openDatabase(url);
  await prepareDatabase(database, url);
  await migrateDatabase(database, ROOT);
  await database.client.execute("PRAGMA wal_checkpoint(TRUNCATE)");
  await database.close();
  // Several test processes may race to here: a rename is whole or not at all, and all bases are equal.
  await rename(path.join(scratch, "base.db"), base);
  await rm(scratch, { recursive: true, force: true });
  return base;
}

/** A private, migrated, empty database file. Call `close` when done: it removes the file too. */
export async function openTestDatabase(): Promise<{
  db: Database;
  /** Folder of the file, for tests that keep other things beside it. */
  folder: string;
  close: () => Promise<void>;
}> {
  const base = await migratedBase();
  const folder = await mkdtemp(path.join(os.tmpdir(), "trimwake-test-"));
  const file = path.join(folder, "test.db");
  await copyFile(base, file);
  const db = openDatabase(`file:${file}`);
  await prepareDatabase(db, `file:${file}`);
  const close = async () => {
    await db.close();
    await rm(folder, { recursive: true, force: true });
  };
  return { db, folder, close };
}

/** A context as the adapter would make it; without `userId` nobody is signed in. */
export function testContext(
  db: Database,
  options: {
    userId?: string;
    authSessionId?: string;
    nowMs?: number | (() => number);
    address?: string | null;
    system?: boolean;
  } = {},
): Context {
  const { userId, nowMs = TEST_NOW_MS } = options;
  const nobody: Context["actor"] = options.system === true ? { kind: "system" } : { kind: "anonymous" };
  return {
    db,
    actor:
      userId === undefined
        ? nobody
        : { kind: "user", userId, authSessionId: options.authSessionId ?? `sign-in-of-${userId}` },
    nowMs: typeof nowMs === "function" ? nowMs : () => nowMs,
    requestId: newId(),
    address: options.address ?? null,
  };
}

/** A confirmed account whose password nobody knows. Give a `passwordHash` to sign in with it. */
export async function makeUser(
  db: Database,
  overrides: Partial<typeof user.$inferInsert> = {},
): Promise<typeof user.$inferSelect> {
  const id = overrides.id ?? newId();
  const rows = await db.write((tx) =>
    tx
      .insert(user)
      .values({
        id,
        email: `${id}@riders.example`,
        emailConfirmedAtMs: TEST_NOW_MS,
        passwordHash: "nobody",
        name: "Test Rider",
        createdAtMs: TEST_NOW_MS,
        ...overrides,
      })
      .returning(),
  );
  return at(rows, 0);
}
