import { spawn } from "node:child_process";
import { createHash } from "node:crypto";
import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import { expect, test } from "vitest";
import { openDatabase, prepareDatabase } from "@/db/client";
import { auditLog } from "@/db/schema/audit-log";
import { upload } from "@/db/schema/upload";
import { seededRng } from "@/lib/numeric/rng";
import { diskStorage } from "@/lib/server/storage/disk-storage";
import { replaceStorage } from "@/lib/server/storage/storage";
import { sweepOrphans } from "@/lib/server/uploads/sweep-files";
import { makeUser, openTestDatabase } from "@/tests/support/test-database";

const ROOT = path.resolve(import.meta.dirname, "../..");
/** More of them in a long run: UPLOAD_KILLS=200. */
const KILLS = Number(process.env["UPLOAD_KILLS"] ?? 8);

/** Runs the child for a while, kills it in the middle of whatever it does, gives back what it had acknowledged. */
function killedAfter(folder: string, userId: string, waitMs: number): Promise<string[]> {
  return new Promise((resolve, reject) => {
    const child = spawn(
      process.execPath,
      ["--import", "tsx", "tests/support/upload-child.ts", folder, userId],
      { cwd: ROOT },
    );
    let out = "";
    let error = "";
    child.stdout.on("data", (data: Buffer) => {
      if (out === "") setTimeout(() => child.kill("SIGKILL"), waitMs);
      out += data.toString();
    });
    child.stderr.on("data", (data: Buffer) => (error += data.toString()));
    child.on("close", (_, signal) => {
      if (signal !== "SIGKILL") reject(new Error(`the child ended by itself: ${error}`));
      else resolve(out.split("\n").filter((line) => line.length === 64));
    });
  });
}

async function hashOf(folder: string, sha256: string): Promise<string> {
  const file = path.join(folder, "files", sha256.slice(0, 2), sha256.slice(2, 4), sha256);
  return createHash("sha256")
    .update(await readFile(file))
    .digest("hex");
}

async function storedNames(folder: string): Promise<string[]> {
  const files = path.join(folder, "files");
  // Killed before the first file was kept: there is no folder yet.
  const entries = await readdir(files, { recursive: true, withFileTypes: true }).catch(() => []);
  return entries.filter((entry) => entry.isFile()).map((entry) => entry.name);
}

test(
  `whatever moment the process is killed at, an acknowledged file is there with its row, and nothing is half there (${KILLS} kills)`,
  async () => {
    const base = await openTestDatabase();
    const { folder } = base;
    const userId = (await makeUser(base.db)).id;
    await base.db.close();
    const rng = seededRng(Date.now());
    const acknowledged: string[] = [];
    for (let kill = 0; kill < KILLS; kill += 1) {
      acknowledged.push(...(await killedAfter(folder, userId, 20 + 300 * rng())));
      const url = `file:${path.join(folder, "test.db")}`;
      const db = openDatabase(url);
      await prepareDatabase(db, url);
      const check = await db.client.execute("PRAGMA quick_check");
      expect(check.rows[0]?.[0]).toBe("ok");
      const rows = await db.read.select().from(upload);
      const named = new Set(rows.map((row) => row.sha256));
      for (const sha256 of acknowledged) expect(named.has(sha256)).toBe(true);
      const audits = await db.read.select({ id: auditLog.subjectId }).from(auditLog);
      expect(new Set(audits.map(({ id }) => id))).toEqual(new Set(rows.map(({ id }) => id)));
      for (const sha256 of named) expect(await hashOf(folder, sha256)).toBe(sha256);
      replaceStorage(diskStorage(folder));
      await sweepOrphans(db, Date.now() + 1000);
      expect(new Set(await storedNames(folder))).toEqual(named);
      expect(await readdir(path.join(folder, "incoming")).catch(() => [])).toEqual([]);
      await db.close();
    }
    expect(acknowledged.length).toBeGreaterThan(KILLS);
    replaceStorage(undefined);
    await base.close();
  },
  60_000 + KILLS * 10_000,
);
