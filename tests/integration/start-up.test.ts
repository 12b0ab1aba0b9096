import { chmod, mkdir, readdir, readFile, writeFile } from "node:fs/promises";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import { openDatabase, type Database } from "@/db/client";
import { user } from "@/db/schema/user";
import { at } from "@/lib/errors/invariant";
import { endWhenBusy, isBusyError } from "@/lib/server/context/database";
import { backUpBeforeMigration, pendingMigrations } from "@/lib/server/start/backup";
import { checkDatabase, freeDiskMb, probeWrite } from "@/lib/server/start/checks";
import { sweep } from "@/lib/server/start/sweep";
import { makeUser, openTestDatabase, TEST_NOW_MS } from "@/tests/support/test-database";

const ROOT = path.resolve(import.meta.dirname, "../..");

let db: Database;
let folder: string;
let close: () => Promise<void>;

beforeEach(async () => {
  vi.spyOn(process.stdout, "write").mockReturnValue(true);
  ({ db, folder, close } = await openTestDatabase());
});
afterEach(() => close());

/** A root folder whose journal knows one migration more than the database has seen. */
async function rootWithNews(): Promise<string> {
  const journal = JSON.parse(await readFile(path.join(ROOT, "drizzle/meta/_journal.json"), "utf8"));
  const last = journal.entries.at(-1);
  journal.entries.push({ ...last, idx: last.idx + 1, when: last.when + 1000, tag: "9999_news" });
  const root = path.join(folder, "root");
  await mkdir(path.join(root, "drizzle/meta"), { recursive: true });
  await writeFile(path.join(root, "drizzle/meta/_journal.json"), JSON.stringify(journal));
  return root;
}

describe("backUpBeforeMigration", () => {
  test("copies a database in use before it changes, and the copy holds the rows", async () => {
    const rider = await makeUser(db, { name: "Aske" });
    const root = await rootWithNews();
    expect(await pendingMigrations(db, root)).toBe(1);
    const file = await backUpBeforeMigration(db, { root, dataDir: folder, nowMs: TEST_NOW_MS });
    expect(path.basename(file ?? "")).toBe("before-migration-20250614T120000000Z.db");
    const copy = openDatabase(`file:${file}`);
    expect(await copy.read.select().from(user)).toEqual([rider]);
    await copy.close();
  });

  test("does nothing when nothing is pending, or nobody is here yet", async () => {
    const place = { dataDir: folder, nowMs: TEST_NOW_MS };
    expect(await backUpBeforeMigration(db, { ...place, root: await rootWithNews() })).toBeNull();
    await makeUser(db);
    expect(await backUpBeforeMigration(db, { ...place, root: ROOT })).toBeNull();
    expect(await readdir(folder)).not.toContain("backups");
  });

  test("knows that a file without any table has everything before it", async () => {
    const empty = openDatabase(`file:${path.join(folder, "empty.db")}`);
    expect(await pendingMigrations(empty, ROOT)).toBeGreaterThan(0);
    await empty.close();
  });

  test("keeps the newest five and nothing that is not its own", async () => {
    await makeUser(db);
    const root = await rootWithNews();
    await mkdir(path.join(folder, "backups"));
    await writeFile(path.join(folder, "backups", "mine.txt"), "kept");
    for (let day = 0; day < 7; day += 1) {
      await backUpBeforeMigration(db, { root, dataDir: folder, nowMs: TEST_NOW_MS + day * 86_400_000 });
    }
    const names = (await readdir(path.join(folder, "backups"))).sort();
    expect(names).toHaveLength(6);
    expect(at(names, 0)).toBe("before-migration-20250616T120000000Z.db");
    expect(names).toContain("mine.txt");
  });
});

describe("checkDatabase", () => {
  test("passes a sound file and says which SQLite serves it", async () => {
    expect((await checkDatabase(db)).version).toMatch(/^3\.\d+\.\d+$/);
  });

  test("refuses rows that refer to rows that are gone, and names their table", async () => {
    await db.client.execute("PRAGMA foreign_keys = OFF");
    await db.client.execute(
      "INSERT INTO email_token (id, user_id, purpose, email, expires_at_ms) VALUES ('t', 'gone', 'confirm_email', 'a', 1)",
    );
    await expect(checkDatabase(db)).rejects.toThrow(/email_token/);
  });

  test("refuses a damaged file", async () => {
    for (let n = 0; n < 200; n += 1) await makeUser(db, { name: `Rider ${n} ${"x".repeat(60)}` });
    await db.client.execute("PRAGMA wal_checkpoint(TRUNCATE)");
    const file = path.join(folder, "test.db");
    const bytes = await readFile(file);
    // Wipes out pages in the second half: the header stays readable, trees do not.
    bytes.fill(0xff, Math.floor(bytes.length / 2 / 4096) * 4096, bytes.length - 4096);
    const damaged = path.join(folder, "damaged.db");
    await writeFile(damaged, bytes);
    const broken = openDatabase(`file:${damaged}`);
    await expect(checkDatabase(broken)).rejects.toThrow();
    await broken.close();
  });
});

describe("storage", () => {
  test("a folder that takes a file passes and is left as it was", async () => {
    const before = await readdir(folder);
    await probeWrite(folder);
    expect(await readdir(folder)).toEqual(before);
    expect(await freeDiskMb(folder)).toBeGreaterThan(0);
  });

  test("a folder that is not there, or takes no file, does not", async () => {
    await expect(probeWrite(path.join(folder, "missing"))).rejects.toThrow();
    const closed = path.join(folder, "closed");
    await mkdir(closed);
    await chmod(closed, 0o500);
    // The superuser may write anywhere, so this half can only be seen by others.
    if (process.getuid?.() !== 0) await expect(probeWrite(closed)).rejects.toThrow();
  });
});

describe("a busy database", () => {
  const busy = Object.assign(new Error("database is locked"), { code: "SQLITE_BUSY" });

  test("ends the process once, however deep the cause, and the write still fails", async () => {
    const end = vi.fn();
    const guarded = endWhenBusy(db, end);
    const failing = guarded.write(async () => {
      throw new Error("Failed query", { cause: busy });
    });
    await expect(failing).rejects.toThrow("Failed query");
    expect(end).toHaveBeenCalledExactlyOnceWith(75);
  });

  test("no other error does", async () => {
    const end = vi.fn();
    const failing = endWhenBusy(db, end).write(async () => {
      throw new Error("a row is missing");
    });
    await expect(failing).rejects.toThrow("a row is missing");
    expect(end).not.toHaveBeenCalled();
    expect(isBusyError("SQLITE_BUSY")).toBe(false);
  });

  test("is what a second writer on the same file meets", async () => {
    const other = openDatabase(`file:${path.join(folder, "test.db")}`);
    const failing = db.write(async (tx) => {
      await tx.insert(user).values({ id: "a", email: "a", passwordHash: "", name: "", createdAtMs: 1 });
      await other.write((second) =>
        second.insert(user).values({ id: "b", email: "b", passwordHash: "", name: "", createdAtMs: 1 }),
      );
    });
    const error = await failing.catch((reason: unknown) => reason);
    expect(isBusyError(error)).toBe(true);
    await other.close();
  });
});

test("sweeping an empty database is no work and no error", async () => {
  await expect(sweep(db, TEST_NOW_MS)).resolves.toBeUndefined();
});
