import { createHash } from "node:crypto";
import { readdir, readFile, utimes, writeFile, mkdir } from "node:fs/promises";
import path from "node:path";
import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { auditLog } from "@/db/schema/audit-log";
import { throttle } from "@/db/schema/throttle";
import { upload } from "@/db/schema/upload";
import type { Context } from "@/lib/server/context/context";
import { diskStorage } from "@/lib/server/storage/disk-storage";
import { replaceStorage, storage } from "@/lib/server/storage/storage";
import { listWaitingUploads } from "@/lib/server/uploads/list-waiting-uploads";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { sweepOrphans, sweepRefusedUploads } from "@/lib/server/uploads/sweep-files";
import { FILE_BYTES_MAX, QUOTA_BYTES } from "@/lib/server/uploads/upload-limits";
import { makeUser, openTestDatabase, TEST_NOW_MS, testContext } from "@/tests/support/test-database";

const current = vi.hoisted((): { context: unknown } => ({ context: null }));
vi.mock("@/lib/server/adapter/request-context", () => ({
  requestContext: () => Promise.resolve(current.context as Context),
}));

let db: Database;
let folder: string;
let close: () => Promise<void>;
let riderId: string;

beforeAll(async () => {
  ({ db, folder, close } = await openTestDatabase());
});
afterAll(async () => {
  replaceStorage(undefined);
  await close();
});
beforeEach(async () => {
  replaceStorage(diskStorage(folder));
  riderId = (await makeUser(db)).id;
  current.context = testContext(db, { userId: riderId });
});

const rider = () => testContext(db, { userId: riderId });
const sha = (bytes: Uint8Array | string) => createHash("sha256").update(bytes).digest("hex");
const bytesOf = (text: string) => new TextEncoder().encode(text);

/** A body that arrives in pieces; `then` says what happens after the last one. */
function body(pieces: Uint8Array[], then: "end" | "abort" | "silence" = "end"): ReadableStream<Uint8Array> {
  let next = 0;
  return new ReadableStream({
    pull(controller) {
      const piece = pieces[next];
      next += 1;
      if (piece !== undefined) controller.enqueue(piece);
      else if (then === "end") controller.close();
      else if (then === "abort") controller.error(new Error("aborted"));
      else return new Promise(() => undefined);
      return undefined;
    },
  });
}

async function post(
  stream: ReadableStream<Uint8Array> | null,
  headers: Record<string, string> = {},
): Promise<Response> {
  const { POST } = await import("@/app/api/uploads/route");
  return POST(
    new Request("http://localhost/api/uploads", {
      method: "POST",
      body: stream,
      duplex: "half",
      headers: { "sec-fetch-site": "same-origin", "content-type": "application/octet-stream", ...headers },
    } as RequestInit),
  );
}

async function incoming(): Promise<string[]> {
  return readdir(path.join(folder, "incoming")).catch(() => []);
}

const rowsOf = (ownerId: string) => db.read.select().from(upload).where(eq(upload.ownerId, ownerId));

describe("POST /api/uploads", () => {
  test("answers 201 only when bytes and row are in place, under the hash of what was sent", async () => {
    const bytes = bytesOf("a whole file, sent in three pieces");
    const response = await post(body([bytes.subarray(0, 5), bytes.subarray(5, 20), bytes.subarray(20)]), {
      "x-file-name": "s%C3%B8ndag.gpx",
    });
    expect(response.status).toBe(201);
    const answer = (await response.json()) as { uploadId: string; sha256: string; duplicate: unknown };
    expect(answer).toMatchObject({ sha256: sha(bytes), duplicate: null });
    const rows = await rowsOf(riderId);
    expect(rows).toMatchObject([
      { id: answer.uploadId, fileName: "søndag.gpx", sizeBytes: bytes.length, status: "stored" },
    ]);
    const kept = path.join(
      folder,
      "files",
      answer.sha256.slice(0, 2),
      answer.sha256.slice(2, 4),
      answer.sha256,
    );
    expect(new Uint8Array(await readFile(kept))).toEqual(bytes);
    expect(await incoming()).toEqual([]);
    expect(await listWaitingUploads(rider())).toMatchObject([{ uploadId: answer.uploadId }]);
  });

  test("gives the same bytes of the same rider one row, and says so", async () => {
    const bytes = bytesOf("twice the same");
    const first = (await (await post(body([bytes]))).json()) as { uploadId: string };
    const second = await post(body([bytes]), { "x-file-name": "other%20name.gpx" });
    expect(second.status).toBe(200);
    expect(await second.json()).toMatchObject({ uploadId: first.uploadId, duplicate: { sessionIds: [] } });
    expect(await rowsOf(riderId)).toHaveLength(1);
  });

  test("gives one row when the same bytes are sent five times at once", async () => {
    const bytes = bytesOf("five at once");
    const answers = await Promise.all(
      Array.from(
        { length: 5 },
        async () => (await post(body([bytes]))).json() as Promise<{ uploadId: string }>,
      ),
    );
    expect(new Set(answers.map((answer) => answer.uploadId)).size).toBe(1);
    expect(await rowsOf(riderId)).toHaveLength(1);
  });

  test("refuses another site, and whoever is not signed in", async () => {
    expect((await post(body([bytesOf("x")]), { "sec-fetch-site": "cross-site" })).status).toBe(404);
    current.context = testContext(db);
    expect((await post(body([bytesOf("x")]))).status).toBe(401);
    expect(await rowsOf(riderId)).toEqual([]);
  });

  test.each([
    ["is longer than it said", "5", 400],
    ["is shorter than it said", "500", 400],
  ])("keeps nothing of a body that %s", async (_, length, status) => {
    const response = await post(body([bytesOf("ten letters")]), { "content-length": length });
    expect(response.status).toBe(status);
    expect(await rowsOf(riderId)).toEqual([]);
    expect(await incoming()).toEqual([]);
  });

  test("keeps nothing of a body that breaks off in the middle", async () => {
    const response = await post(body([new Uint8Array(100_000)], "abort"));
    expect(response.status).toBe(400);
    expect(((await response.json()) as { title: string }).title).toContain("did not arrive whole");
    expect(await rowsOf(riderId)).toEqual([]);
    expect(await incoming()).toEqual([]);
  });

  test("stops at 50 MB, whether the sender declares them or not", async () => {
    const piece = new Uint8Array(1_000_000);
    const more = Array.from({ length: FILE_BYTES_MAX / piece.length + 1 }, () => piece);
    const streamed = await post(body(more));
    expect(streamed.status).toBe(413);
    expect(((await streamed.json()) as { title: string }).title).toContain("larger than 50 MB");
    expect((await post(body([piece]), { "content-length": String(FILE_BYTES_MAX + 1) })).status).toBe(413);
    expect(await incoming()).toEqual([]);
  });

  test("refuses an empty file with a sentence", async () => {
    const response = await post(null);
    expect(response.status).toBe(422);
    expect(((await response.json()) as { title: string }).title).toMatch(/^The file is empty\. /);
  });

  test("answers 507 and keeps nothing when the disk is nearly full, and takes files again afterwards", async () => {
    replaceStorage({ ...storage(), freeBytes: () => Promise.resolve(499_000_000) });
    const response = await post(body([bytesOf("no room")]));
    expect(response.status).toBe(507);
    expect(((await response.json()) as { title: string }).title).toContain("no room left");
    replaceStorage(diskStorage(folder));
    expect((await post(body([bytesOf("no room")]))).status).toBe(201);
  });
});

describe("receiving an upload", () => {
  test("gives up on a sender that has gone quiet, and keeps nothing", async () => {
    const work = receiveUpload(rider(), {
      fileName: "slow.gpx",
      body: body([new Uint8Array(1000)], "silence"),
      declaredBytes: 2000,
      idleMs: 50,
    });
    await expect(work).rejects.toMatchObject({ status: 408 });
    expect(await incoming()).toEqual([]);
  });

  test("keeps two riders' equal bytes apart as rows", async () => {
    const other = (await makeUser(db)).id;
    const send = (userId: string) =>
      receiveUpload(testContext(db, { userId }), {
        fileName: "same.gpx",
        body: body([bytesOf("shared bytes")]),
        declaredBytes: null,
      });
    const mine = await send(riderId);
    const theirs = await send(other);
    expect(theirs.duplicate).toBeNull();
    expect(theirs.uploadId).not.toBe(mine.uploadId);
  });

  test("stops at the quota of an account", async () => {
    await db.write((tx) =>
      tx.insert(upload).values({
        id: `full-${riderId}`,
        ownerId: riderId,
        sha256: sha(riderId),
        sizeBytes: QUOTA_BYTES - 3,
        fileName: "big",
        status: "done",
        verdicts: [],
        createdAtMs: TEST_NOW_MS,
      }),
    );
    const work = receiveUpload(rider(), {
      fileName: "x",
      body: body([bytesOf("four")]),
      declaredBytes: null,
    });
    await expect(work).rejects.toMatchObject({
      status: 413,
      message: expect.stringContaining("2000 MB") as string,
    });
    expect(await incoming()).toEqual([]);
  });

  test("stops after 200 files in an hour and goes on in the next", async () => {
    let nowMs = TEST_NOW_MS;
    const ctx = testContext(db, { userId: riderId, nowMs: () => nowMs });
    const send = (n: number) =>
      receiveUpload(ctx, {
        fileName: "x",
        body: body([bytesOf(`file ${n} of ${riderId}`)]),
        declaredBytes: null,
      });
    for (let n = 0; n < 200; n += 1) await send(n);
    await expect(send(200)).rejects.toMatchObject({ status: 429 });
    nowMs += 3_600_001;
    await expect(send(200)).resolves.toMatchObject({ duplicate: null });
    expect((await db.read.select().from(throttle)).every((row) => !row.key.includes(riderId))).toBe(true);
  });

  test("writes who stored what, without the name of the file", async () => {
    const { uploadId } = await receiveUpload(rider(), {
      fileName: "secret spot.gpx",
      body: body([bytesOf("audited")]),
      declaredBytes: null,
    });
    const rows = await db.read.select().from(auditLog).where(eq(auditLog.subjectId, uploadId));
    expect(rows).toMatchObject([{ actorId: riderId, action: "upload.store", detail: { sizeBytes: 7 } }]);
  });
});

describe("the sweep at start", () => {
  test("removes temporary files and bytes without a row, and nothing that is needed or new", async () => {
    const { sha256 } = await receiveUpload(rider(), {
      fileName: "needed.gpx",
      body: body([bytesOf("needed")]),
      declaredBytes: null,
    });
    const place = async (text: string, ageMs: number) => {
      const name = sha(text);
      const target = path.join(folder, "files", name.slice(0, 2), name.slice(2, 4), name);
      await mkdir(path.dirname(target), { recursive: true });
      await writeFile(target, text);
      await utimes(target, new Date(Date.now() - ageMs), new Date(Date.now() - ageMs));
      return name;
    };
    const orphan = await place("orphan", 60_000);
    const fresh = await place("being kept just now", 0);
    const half = path.join(folder, "incoming", "half");
    await mkdir(path.dirname(half), { recursive: true });
    await writeFile(half, "half");
    await utimes(half, new Date(0), new Date(0));
    await utimes(
      path.join(folder, "files", sha256.slice(0, 2), sha256.slice(2, 4), sha256),
      new Date(0),
      new Date(0),
    );
    const swept = await sweepOrphans(db, Date.now() - 30_000);
    expect(swept).toMatchObject({ temporary: 1, orphans: 1 });
    expect(await storage().has(orphan)).toBe(false);
    expect(await storage().has(fresh)).toBe(true);
    expect(await storage().has(sha256)).toBe(true);
  });

  test("forgets refused files after 30 days, with their bytes", async () => {
    const { uploadId, sha256 } = await receiveUpload(rider(), {
      fileName: "refused.gpx",
      body: body([bytesOf("refused long ago")]),
      declaredBytes: null,
    });
    await db.write((tx) => tx.update(upload).set({ status: "done" }).where(eq(upload.id, uploadId)));
    expect(await sweepRefusedUploads(db, TEST_NOW_MS + 29 * 86_400_000)).toBe(0);
    await db.write((tx) => tx.update(upload).set({ status: "done" }).where(eq(upload.id, uploadId)));
    expect(await sweepRefusedUploads(db, TEST_NOW_MS + 31 * 86_400_000)).toBeGreaterThanOrEqual(1);
    expect(await rowsOf(riderId)).toEqual([]);
    expect(await storage().has(sha256)).toBe(false);
  });
});
