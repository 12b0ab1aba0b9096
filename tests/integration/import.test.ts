import { gzipSync } from "node:zlib";
import { and, eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { zipSync } from "fflate";
import type { Database } from "@/db/client";
import { newId } from "@/db/new-id";
import { auditLog } from "@/db/schema/audit-log";
import { gearSpan } from "@/db/schema/gear-span";
import { session } from "@/db/schema/session";
import { sessionFigures } from "@/db/schema/session-figures";
import { setup } from "@/db/schema/setup";
import { track } from "@/db/schema/track";
import { upload } from "@/db/schema/upload";
import { at } from "@/lib/errors/invariant";
import { deleteSession, purgeDeletedSessions, restoreSession } from "@/lib/server/sessions/delete-session";
import { storage } from "@/lib/server/storage/storage";
import { PER_OWNER_MAX } from "@/lib/server/uploads/analyse-stored";
import { importUpload } from "@/lib/server/uploads/import-upload";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { decodeSeries } from "@/lib/track/series-blob";
import { useUploadServices } from "@/tests/support/analysis-worker";
import { madeGpx, RIDE_START_MS, type MadeRide } from "@/tests/support/made-gpx";
import { makeUser, openTestDatabase, TEST_NOW_MS, testContext } from "@/tests/support/test-database";

let db: Database;
let close: () => Promise<void>;
let riderId: string;

beforeAll(async () => {
  const base = await openTestDatabase();
  db = base.db;
  const services = await useUploadServices(base.folder, { timeLimitMs: 20_000 });
  close = async () => {
    await services.close();
    await base.close();
  };
});
afterAll(() => close());
beforeEach(async () => {
  riderId = (await makeUser(db)).id;
});

const rider = (nowMs = TEST_NOW_MS) => testContext(db, { userId: riderId, nowMs });

async function send(bytes: Uint8Array, fileName: string): Promise<string> {
  const stored = await receiveUpload(rider(), {
    fileName,
    body: new Blob([Uint8Array.from(bytes)]).stream(),
    declaredBytes: bytes.length,
  });
  return stored.uploadId;
}

const sendRide = (ride: MadeRide = {}, fileName = "ride.gpx") =>
  send(new TextEncoder().encode(madeGpx(ride)), fileName);

async function makeSetup(ownerId: string): Promise<string> {
  const id = newId();
  await db.write((tx) =>
    tx.insert(setup).values({ id, ownerId, name: "Test setup", createdAtMs: TEST_NOW_MS }),
  );
  return id;
}

const sessionsOf = (ownerId: string) => db.read.select().from(session).where(eq(session.ownerId, ownerId));

describe("importing an upload", () => {
  test("makes one whole session of it: row, track, figures, gear span, verdict, audit", async () => {
    const setupId = await makeSetup(riderId);
    const uploadId = await sendRide();
    const verdicts = await importUpload(rider(), { uploadId, setupId });
    expect(verdicts).toMatchObject([{ kind: "read", entryName: "", sameAs: null }]);
    const row = at(await sessionsOf(riderId), 0);
    expect(row).toMatchObject({
      uploadId,
      format: "gpx",
      discipline: "downwind",
      timeZone: "Europe/Copenhagen",
    });
    expect(row.title).toBe("Downwinder heading ENE from 57.12° N 9.32° E");
    // The made ride flies 900 s at a mean of 7.5 m/s, that is 6,750 m; rest and noise add less than 3 %.
    const figures = await db.read.select().from(sessionFigures).where(eq(sessionFigures.sessionId, row.id));
    expect(figures).toHaveLength(2);
    expect(figures.map((one) => one.setupId)).toEqual([setupId, setupId]);
    for (const one of figures) expect(Math.abs(one.waterDistanceM - 6750)).toBeLessThan(0.03 * 6750);
    const kept = at(await db.read.select().from(track).where(eq(track.sessionId, row.id)), 0);
    expect(decodeSeries(kept.series).count).toBeGreaterThan(900);
    expect(kept).toMatchObject({ firstFixMs: RIDE_START_MS, lastFixMs: RIDE_START_MS + 1_079_000 });
    const spans = await db.read.select().from(gearSpan).where(eq(gearSpan.sessionId, row.id));
    expect(spans).toMatchObject([{ setupId, startMs: row.startMs, endMs: row.endMs }]);
    expect(await db.read.select().from(upload).where(eq(upload.id, uploadId))).toMatchObject([
      { status: "done", verdicts: [{ kind: "read", sessionId: row.id }] },
    ]);
    const audits = await db.read.select().from(auditLog).where(eq(auditLog.subjectId, row.id));
    expect(audits).toMatchObject([{ action: "session.create", actorId: riderId }]);
  });

  test("asked five times at once makes one session", async () => {
    const uploadId = await sendRide({ seed: 5 });
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => importUpload(rider(), { uploadId, setupId: null })),
    );
    expect(new Set(answers.map((verdicts) => JSON.stringify(verdicts))).size).toBe(1);
    expect(await sessionsOf(riderId)).toHaveLength(1);
  });

  test("asked again later says that it is in the log, and which session it is", async () => {
    const uploadId = await sendRide();
    const first = at(await importUpload(rider(), { uploadId, setupId: null }), 0);
    const again = await importUpload(rider(), { uploadId: await sendRide(), setupId: null });
    expect(again).toMatchObject([
      { kind: "already", sessionId: first.kind === "refused" ? "" : first.sessionId },
    ]);
    expect(await sessionsOf(riderId)).toHaveLength(1);
  });

  test("offers a deleted session back instead of making a second one", async () => {
    const uploadId = await sendRide();
    await importUpload(rider(), { uploadId, setupId: null });
    const { id } = at(await sessionsOf(riderId), 0);
    await deleteSession(rider(), id);
    expect(await importUpload(rider(), { uploadId, setupId: null })).toMatchObject([
      { kind: "deleted", sessionId: id },
    ]);
    await restoreSession(rider(), id);
    expect(await importUpload(rider(), { uploadId, setupId: null })).toMatchObject([{ kind: "already" }]);
  });

  test("says when another file holds the same outing, and keeps both", async () => {
    const gpx = madeGpx();
    const first = at(
      await importUpload(rider(), {
        uploadId: await send(new TextEncoder().encode(gpx), "a.gpx"),
        setupId: null,
      }),
      0,
    );
    const packed = await send(gzipSync(gpx), "a.gpx.gz");
    const second = at(await importUpload(rider(), { uploadId: packed, setupId: null }), 0);
    expect(second).toMatchObject({
      kind: "read",
      sameAs: { sessionId: first.kind === "refused" ? "" : first.sessionId },
    });
    expect(await sessionsOf(riderId)).toHaveLength(2);
  });

  test("reads every track of a zip and gives each its verdict", async () => {
    const encode = (text: string) => new TextEncoder().encode(text);
    const zip = zipSync({
      "one.gpx": encode(madeGpx({ rideS: 300 })),
      "two.gpx": encode(madeGpx({ rideS: 300, startMs: RIDE_START_MS + 86_400_000, seed: 2 })),
      "letter.txt": encode("Dear sailor"),
    });
    const uploadId = await send(zip, "week.zip");
    const verdicts = await importUpload(rider(), { uploadId, setupId: null });
    expect(verdicts.map(({ kind, entryName }) => [entryName, kind]).sort()).toEqual([
      ["letter.txt", "refused"],
      ["one.gpx", "read"],
      ["two.gpx", "read"],
    ]);
    expect((await sessionsOf(riderId)).map((row) => row.entryName).sort()).toEqual(["one.gpx", "two.gpx"]);
    // Asked again, the two are there and the letter is still no track.
    const again = await importUpload(rider(), { uploadId, setupId: null });
    expect(again.map((verdict) => verdict.kind).sort()).toEqual(["already", "already", "refused"]);
    expect(await sessionsOf(riderId)).toHaveLength(2);
  });

  test('keeps to "other" for a rider who said so last time', async () => {
    await importUpload(rider(), { uploadId: await sendRide(), setupId: null });
    await db.write((tx) =>
      tx.update(session).set({ discipline: "other" }).where(eq(session.ownerId, riderId)),
    );
    const next = await sendRide({ startMs: RIDE_START_MS + 3_600_000, seed: 9 });
    await importUpload(rider(TEST_NOW_MS + 1), { uploadId: next, setupId: null });
    expect((await sessionsOf(riderId)).map((row) => row.discipline)).toEqual(["other", "other"]);
  });

  test.each([
    ["an HTML page", "<!doctype html><html><body>gpx</body></html>", /Choose a GPX, TCX, KML or FIT file/],
    [
      "a GPX without times",
      `<gpx><trk><trkseg>${'<trkpt lat="57" lon="9"/>'.repeat(20)}</trkseg></trk></gpx>`,
      /without times/,
    ],
    [
      "one fix",
      '<gpx><trk><trkseg><trkpt lat="57" lon="9"><time>2025-06-14T11:00:00Z</time></trkpt></trkseg></trk></gpx>',
      /fewer than two/,
    ],
  ])("refuses %s in words and leaves no session", async (_, text, sentence) => {
    const uploadId = await send(new TextEncoder().encode(text), "track.gpx");
    const verdicts = await importUpload(rider(), { uploadId, setupId: null });
    expect(verdicts).toMatchObject([{ kind: "refused", text: expect.stringMatching(sentence) as string }]);
    expect(await sessionsOf(riderId)).toEqual([]);
    expect(await db.read.select().from(upload).where(eq(upload.id, uploadId))).toMatchObject([
      { status: "done", verdicts: [{ kind: "refused" }] },
    ]);
  });

  test("writes nothing at all when the last of its writes fails", async () => {
    const uploadId = await sendRide({ seed: 77 });
    const failing = {
      ...db,
      write: (<T>(work: Parameters<typeof db.write<T>>[0]) =>
        db.write<T>(async (tx) => {
          await work(tx);
          throw new Error("disk gone");
        })) as Database["write"],
    };
    const ctx = { ...rider(), db: failing };
    await expect(importUpload(ctx, { uploadId, setupId: null })).rejects.toThrow("disk gone");
    expect(await sessionsOf(riderId)).toEqual([]);
    expect(await db.read.select().from(upload).where(eq(upload.id, uploadId))).toMatchObject([
      { status: "stored" },
    ]);
    expect(await importUpload(rider(), { uploadId, setupId: null })).toMatchObject([{ kind: "read" }]);
  });

  test("is not for strangers, the signed-out, or setups and fields that are not the asker's", async () => {
    const uploadId = await sendRide();
    const strangerId = (await makeUser(db)).id;
    const stranger = testContext(db, { userId: strangerId });
    await expect(importUpload(stranger, { uploadId, setupId: null })).rejects.toMatchObject({
      code: "not_found",
    });
    await expect(importUpload(testContext(db), { uploadId, setupId: null })).rejects.toMatchObject({
      code: "unauthenticated",
    });
    const theirs = await makeSetup(strangerId);
    await expect(importUpload(rider(), { uploadId, setupId: theirs })).rejects.toMatchObject({
      code: "not_found",
    });
    await expect(importUpload(rider(), { uploadId, setupId: null, ownerId: "x" })).rejects.toMatchObject({
      code: "validation",
    });
    expect(await sessionsOf(riderId)).toEqual([]);
  });
});

test("one rider's many files do not fill the pool for everybody", async () => {
  const ids: string[] = [];
  for (let n = 0; n <= PER_OWNER_MAX; n += 1) ids.push(await sendRide({ seed: 60 + n }, `${n}.gpx`));
  const answers = await Promise.allSettled(
    ids.map((uploadId) => importUpload(rider(), { uploadId, setupId: null })),
  );
  const refused = answers.filter((one) => one.status === "rejected");
  expect(refused).toMatchObject([{ reason: { code: "limit_exceeded" } }]);
  // What was refused is read when it is asked for again; nothing stays counted.
  for (const uploadId of ids) await importUpload(rider(), { uploadId, setupId: null });
  expect(await sessionsOf(riderId)).toHaveLength(PER_OWNER_MAX + 1);
});

describe("the purge of deleted sessions", () => {
  test("removes rows and raw bytes after 30 days, and only then", async () => {
    const uploadId = await sendRide({ seed: 31 });
    await importUpload(rider(), { uploadId, setupId: null });
    const { id } = at(await sessionsOf(riderId), 0);
    const { sha256 } = at(await db.read.select().from(upload).where(eq(upload.id, uploadId)), 0);
    await deleteSession(rider(), id);
    await purgeDeletedSessions(db, TEST_NOW_MS + 29 * 86_400_000);
    expect(await sessionsOf(riderId)).toHaveLength(1);
    expect(await purgeDeletedSessions(db, TEST_NOW_MS + 31 * 86_400_000)).toBeGreaterThanOrEqual(1);
    expect(await sessionsOf(riderId)).toEqual([]);
    expect(await db.read.select().from(track).where(eq(track.sessionId, id))).toEqual([]);
    expect(
      await db.read
        .select()
        .from(upload)
        .where(and(eq(upload.id, uploadId))),
    ).toEqual([]);
    expect(await storage().has(sha256)).toBe(false);
  });

  test("spares a session that its rider brings back at the very moment", async () => {
    const uploadId = await sendRide({ seed: 32 });
    await importUpload(rider(), { uploadId, setupId: null });
    const { id } = at(await sessionsOf(riderId), 0);
    await deleteSession(rider(), id);
    // The list of what is due is read, then the rider's write comes before the purge's own.
    let restored = 0;
    const write: Database["write"] = async (work) => {
      if (restored === 0) await restoreSession(rider(), id);
      restored += 1;
      return db.write(work);
    };
    expect(await purgeDeletedSessions({ ...db, write }, TEST_NOW_MS + 31 * 86_400_000)).toBe(0);
    expect(restored).toBeGreaterThan(0);
    expect(await sessionsOf(riderId)).toMatchObject([{ id, deletedAtMs: null }]);
  });
});
