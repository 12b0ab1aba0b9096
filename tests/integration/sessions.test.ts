import { eq } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { newId } from "@/db/new-id";
import { auditLog } from "@/db/schema/audit-log";
import { gearSpan } from "@/db/schema/gear-span";
import { session } from "@/db/schema/session";
import { sessionFigures } from "@/db/schema/session-figures";
import { setup } from "@/db/schema/setup";
import { track } from "@/db/schema/track";
import { decodeTrackPayload } from "@/lib/analysis/track-payload";
import { at } from "@/lib/errors/invariant";
import type { Context } from "@/lib/server/context/context";
import { listPlaces } from "@/lib/server/places/list-places";
import { recordPlace } from "@/lib/server/places/record-place";
import { deleteSession, restoreSession } from "@/lib/server/sessions/delete-session";
import { getRawFile } from "@/lib/server/sessions/get-raw-file";
import { getSession } from "@/lib/server/sessions/get-session";
import { getTrackPayload } from "@/lib/server/sessions/get-track-payload";
import { reanalyseOldSessions } from "@/lib/server/sessions/reanalyse-old-sessions";
import { trimSession } from "@/lib/server/sessions/trim-session";
import { updateSession } from "@/lib/server/sessions/update-session";
import { importUpload } from "@/lib/server/uploads/import-upload";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { useUploadServices } from "@/tests/support/analysis-worker";
import { madeGpx, RIDE_START_MS, type MadeRide } from "@/tests/support/made-gpx";
import { makeUser, openTestDatabase, TEST_NOW_MS, testContext } from "@/tests/support/test-database";

const current = vi.hoisted((): { context: unknown } => ({ context: null }));
vi.mock("@/lib/server/adapter/request-context", () => ({
  requestContext: () => Promise.resolve(current.context as Context),
}));

let db: Database;
let close: () => Promise<void>;
let riderId: string;
let strangerId: string;

beforeAll(async () => {
  const base = await openTestDatabase();
  db = base.db;
  const services = await useUploadServices(base.folder, { timeLimitMs: 20_000 });
  riderId = (await makeUser(db)).id;
  strangerId = (await makeUser(db)).id;
  close = async () => {
    await services.close();
    await base.close();
  };
});
afterAll(() => close());

const rider = () => testContext(db, { userId: riderId });
const stranger = () => testContext(db, { userId: strangerId });
const nobody = () => testContext(db);

let seed = 100;

/** A session of the rider from a made ride of its own day; with a setup when asked. */
async function makeSession(ride: MadeRide = {}, setupId: string | null = null, fileName = "ride.gpx") {
  seed += 1;
  const gpx = madeGpx({ seed, startMs: RIDE_START_MS + seed * 86_400_000, ...ride });
  const { uploadId } = await receiveUpload(rider(), {
    fileName,
    body: new Blob([gpx]).stream(),
    declaredBytes: null,
  });
  const verdict = at(await importUpload(rider(), { uploadId, setupId }), 0);
  if (verdict.kind !== "read") throw new Error(`made ride was ${verdict.kind}`);
  return { id: verdict.sessionId, gpx };
}

const rowOf = async (id: string) => at(await db.read.select().from(session).where(eq(session.id, id)), 0);
const trackRowOf = async (id: string) =>
  at(await db.read.select().from(track).where(eq(track.sessionId, id)), 0);

async function makeSetup(): Promise<string> {
  const id = newId();
  await db.write((tx) =>
    tx.insert(setup).values({ id, ownerId: riderId, name: "Test setup", createdAtMs: TEST_NOW_MS }),
  );
  return id;
}

describe("every verb on a session", () => {
  test("is not there for strangers, and asks the signed-out to sign in", async () => {
    const { id } = await makeSession({ rideS: 120 });
    const verbs: ((ctx: Context) => Promise<unknown>)[] = [
      (ctx) => getSession(ctx, id),
      (ctx) => getTrackPayload(ctx, id),
      (ctx) => getRawFile(ctx, id),
      (ctx) => trimSession(ctx, id, null),
      (ctx) => updateSession(ctx, id, { title: "Mine now" }),
      (ctx) => deleteSession(ctx, id),
      (ctx) => restoreSession(ctx, id),
      (ctx) => recordPlace(ctx, { sessionId: id, end: "start", name: "Theirs" }),
    ];
    for (const verb of verbs) {
      await expect(verb(stranger())).rejects.toMatchObject({ code: "not_found" });
      await expect(verb(nobody())).rejects.toMatchObject({ code: "unauthenticated" });
    }
    await expect(listPlaces(nobody())).rejects.toMatchObject({ code: "unauthenticated" });
    expect(await listPlaces(stranger())).toEqual([]);
    expect(await rowOf(id)).toMatchObject({ deletedAtMs: null, titleIsOwn: false });
  });
});

describe("updating a session", () => {
  test("writes what the rider says in SI units, leaves the rest, and keeps an audit row", async () => {
    const { id } = await makeSession({ rideS: 120 });
    await updateSession(rider(), id, {
      spot: "  Løkken  ",
      windFromDeg: 360,
      windSpeedMps: 8.75,
      wavePeriodS: 6,
      waveHeightM: 1.2,
      water: "sea",
      notes: "Lumpy.",
    });
    expect(await rowOf(id)).toMatchObject({
      spot: "Løkken",
      windFromDeg: 0,
      windSpeedMps: 8.75,
      wavePeriodS: 6,
      waveHeightM: 1.2,
      water: "sea",
      notes: "Lumpy.",
      titleIsOwn: false,
    });
    await updateSession(rider(), id, { windSpeedMps: null });
    expect(await rowOf(id)).toMatchObject({ windSpeedMps: null, waveHeightM: 1.2 });
    const rows = await db.read.select().from(auditLog).where(eq(auditLog.subjectId, id));
    expect(rows.filter(({ action }) => action === "session.update")).toHaveLength(2);
  });

  test("takes an own title and gives it back to the place names when it is emptied", async () => {
    const { id } = await makeSession({ rideS: 120 });
    const { title } = await rowOf(id);
    await updateSession(rider(), id, { title: "The big one" });
    expect(await rowOf(id)).toMatchObject({ title: "The big one", titleIsOwn: true });
    await updateSession(rider(), id, { title: "" });
    expect(await rowOf(id)).toMatchObject({ title, titleIsOwn: false });
  });

  test("works the figures out again for another discipline, under the same rows", async () => {
    const setupId = await makeSetup();
    const { id } = await makeSession({ rideS: 400 }, setupId);
    await updateSession(rider(), id, { discipline: "wing" });
    expect(await rowOf(id)).toMatchObject({ discipline: "wing" });
    expect((await rowOf(id)).title).toMatch(/^Wing session heading ENE from /);
    const figures = await db.read.select().from(sessionFigures).where(eq(sessionFigures.sessionId, id));
    expect(figures.map((one) => [one.discipline, one.setupId])).toEqual([
      ["wing", setupId],
      ["wing", setupId],
    ]);
  });

  test.each([
    [{ windFromDeg: 400 }, "windFromDeg"],
    [{ windSpeedMps: -1 }, "windSpeedMps"],
    [{ waveHeightM: 100 }, "waveHeightM"],
    [{ discipline: "kite" }, "discipline"],
    [{ title: "x".repeat(121) }, "title"],
    [{ ownerId: "me" }, "form"],
  ])("refuses %j by its field and changes nothing", async (input, field) => {
    const { id } = await makeSession({ rideS: 60 });
    const before = await rowOf(id);
    const error = await updateSession(rider(), id, input).catch((caught: unknown) => caught);
    expect(error).toMatchObject({ code: "validation", fields: { [field]: expect.any(String) as string } });
    expect(await rowOf(id)).toEqual(before);
  });
});

describe("trimming a session", () => {
  test("works everything out between the new ends, cuts gear spans, and can be taken back", async () => {
    const setupId = await makeSetup();
    const { id } = await makeSession({ rideS: 900 }, setupId);
    const before = await rowOf(id);
    const { firstFixMs } = await trackRowOf(id);
    // Of a steady flight at a mean of 7.5 m/s, 400 s are 3,000 m; surges and noise stay within 2 %.
    const trim = { startMs: firstFixMs + 300_000, endMs: firstFixMs + 700_000 };
    await trimSession(rider(), id, trim);
    const after = await getSession(rider(), id);
    expect(after).toMatchObject({ ...trim, trimStartMs: trim.startMs, trimEndMs: trim.endMs });
    expect(Math.abs(after.figures.waterDistanceM - 3000)).toBeLessThan(60);
    expect(await db.read.select().from(gearSpan).where(eq(gearSpan.sessionId, id))).toMatchObject([trim]);
    const rows = await db.read.select().from(sessionFigures).where(eq(sessionFigures.sessionId, id));
    expect(rows).toHaveLength(2);
    for (const row of rows) expect(row.startMs).toBe(trim.startMs);
    await trimSession(rider(), id, null);
    const { startMs, endMs, trimStartMs } = await rowOf(id);
    expect({ startMs, endMs, trimStartMs }).toEqual({
      startMs: before.startMs,
      endMs: before.endMs,
      trimStartMs: null,
    });
    expect(await db.read.select().from(gearSpan).where(eq(gearSpan.sessionId, id))).toMatchObject([
      { startMs: before.startMs, endMs: before.endMs },
    ]);
  });

  test.each([
    [
      "ends outside the recording",
      (first: number) => ({ startMs: first - 5000, endMs: first + 60_000 }),
      "startMs",
    ],
    ["an end before its start", (first: number) => ({ startMs: first + 60_000, endMs: first }), "endMs"],
  ])("refuses %s", async (_, ends, field) => {
    const { id } = await makeSession({ rideS: 120 });
    const { firstFixMs } = await trackRowOf(id);
    await expect(trimSession(rider(), id, ends(firstFixMs))).rejects.toMatchObject({
      code: "validation",
      fields: { [field]: expect.any(String) as string },
    });
  });

  test("does not write over what another window changed meanwhile", async () => {
    const { id } = await makeSession({ rideS: 200 });
    const { firstFixMs } = await trackRowOf(id);
    const ends = (fromS: number) => ({ startMs: firstFixMs + fromS * 1000, endMs: firstFixMs + 300_000 });
    const results = await Promise.allSettled([
      trimSession(rider(), id, ends(130)),
      trimSession(rider(), id, ends(140)),
    ]);
    expect(results.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    expect(results.find(({ status }) => status === "rejected")).toMatchObject({
      reason: { code: "conflict" },
    });
  });
});

describe("deleting a session", () => {
  test("takes it out of reach and brings it back as it was", async () => {
    const { id } = await makeSession({ rideS: 120 });
    const before = await rowOf(id);
    await deleteSession(rider(), id);
    await expect(getTrackPayload(rider(), id)).rejects.toMatchObject({ code: "not_found" });
    await expect(getRawFile(rider(), id)).rejects.toMatchObject({ code: "not_found" });
    await expect(updateSession(rider(), id, { title: "x" })).rejects.toMatchObject({ code: "not_found" });
    await expect(deleteSession(rider(), id)).rejects.toMatchObject({ code: "not_found" });
    expect(await getSession(rider(), id)).toMatchObject({ deletedAtMs: TEST_NOW_MS });
    await restoreSession(rider(), id);
    await restoreSession(rider(), id);
    expect(await rowOf(id)).toEqual(before);
  });
});

describe("naming places", () => {
  test("retitles every session that begins or ends there, but not those with an own title", async () => {
    const here = { latDeg: 10.5, lonDeg: -60.5, rideS: 900 };
    const first = await makeSession(here);
    const second = await makeSession(here);
    const own = await makeSession(here);
    await updateSession(rider(), own.id, { title: "My words" });
    await recordPlace(rider(), { sessionId: first.id, end: "start", name: "North Beach" });
    await recordPlace(rider(), { sessionId: first.id, end: "end", name: "Long Sand" });
    expect((await rowOf(first.id)).title).toBe("North Beach to Long Sand");
    expect((await rowOf(second.id)).title).toBe("North Beach to Long Sand");
    expect((await rowOf(own.id)).title).toBe("My words");
    // The same end named again is the same place under a new name.
    await recordPlace(rider(), { sessionId: second.id, end: "end", name: "Longsand" });
    expect((await rowOf(first.id)).title).toBe("North Beach to Longsand");
    expect((await listPlaces(rider())).map(({ name }) => name)).toEqual(["Longsand", "North Beach"]);
    const third = await makeSession(here);
    expect((await rowOf(third.id)).title).toBe("North Beach to Longsand");
  });

  test("refuses a place without a name", async () => {
    const { id } = await makeSession({ rideS: 60 });
    await expect(recordPlace(rider(), { sessionId: id, end: "start", name: " " })).rejects.toMatchObject({
      code: "validation",
      fields: { name: "Enter a name for the place." },
    });
  });
});

describe("the routes of a session", () => {
  const params = (sessionId: string) => ({ params: Promise.resolve({ sessionId }) });

  test("send the track once, then say that it has not changed", async () => {
    const { GET } = await import("@/app/api/sessions/[sessionId]/track/route");
    const { id } = await makeSession({ rideS: 300 });
    current.context = rider();
    const url = `http://localhost/api/sessions/${id}/track`;
    const response = await GET(new Request(url), params(id));
    expect(response.status).toBe(200);
    expect(response.headers.get("cache-control")).toBe("private, no-cache");
    const payload = decodeTrackPayload(await response.arrayBuffer());
    const { windowStartMs, windowEndMs, quality } = await trackRowOf(id);
    expect(payload.window).toEqual({ startMs: windowStartMs, endMs: windowEndMs });
    expect(payload.quality).toEqual(quality);
    expect(payload.segments.length).toBeGreaterThan(0);
    const etag = response.headers.get("etag") ?? "";
    const again = await GET(new Request(url, { headers: { "if-none-match": etag } }), params(id));
    expect(again.status).toBe(304);
    await trimSession(rider(), id, { startMs: windowStartMs + 20_000, endMs: windowEndMs });
    const changed = await GET(new Request(url, { headers: { "if-none-match": etag } }), params(id));
    expect(changed.status).toBe(200);
    current.context = stranger();
    expect((await GET(new Request(url), params(id))).status).toBe(404);
  });

  test("hand out the raw file byte for byte, to be saved under its own name", async () => {
    const { GET } = await import("@/app/api/sessions/[sessionId]/raw/route");
    const { id, gpx } = await makeSession({ rideS: 60 }, null, 'søndag "1".gpx');
    current.context = rider();
    const response = await GET(new Request(`http://localhost/api/sessions/${id}/raw`), params(id));
    expect(await response.text()).toBe(gpx);
    expect(response.headers.get("content-disposition")).toBe(
      "attachment; filename=\"s_ndag _1_.gpx\"; filename*=UTF-8''s%C3%B8ndag%20%221%22.gpx",
    );
    expect(response.headers.get("x-content-type-options")).toBe("nosniff");
    current.context = nobody();
    expect((await GET(new Request("http://localhost/x"), params(id))).status).toBe(401);
  });
});

describe("working old sessions out again", () => {
  test("walks those of an older analysis from their raw files and leaves the rider's words", async () => {
    const { id } = await makeSession({ rideS: 300 });
    await updateSession(rider(), id, { title: "Kept", notes: "Kept too" });
    const { version } = decodeTrackPayload((await getTrackPayload(rider(), id)).bytes);
    await db.write(async (tx) => {
      await tx
        .update(session)
        .set({ analysisVersion: version - 1, endMs: 1 })
        .where(eq(session.id, id));
    });
    const seen: string[] = [];
    const result = await reanalyseOldSessions(testContext(db, { system: true }), (one) =>
      seen.push(one.sessionId),
    );
    expect(result).toEqual({ done: 1, failed: 0 });
    expect(seen).toEqual([id]);
    const after = await rowOf(id);
    expect(after).toMatchObject({ title: "Kept", notes: "Kept too", analysisVersion: version });
    expect(after.endMs).toBe((await trackRowOf(id)).windowEndMs);
    await expect(reanalyseOldSessions(rider(), () => undefined)).rejects.toMatchObject({ code: "forbidden" });
  });
});
