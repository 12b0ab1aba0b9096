import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { eq } from "drizzle-orm";
import type { Database } from "@/db/client";
import { auditLog } from "@/db/schema/audit-log";
import { part } from "@/db/schema/part";
import { sessionFigures } from "@/db/schema/session-figures";
import { setup } from "@/db/schema/setup";
import { createPart, PARTS_MAX, retirePart, updatePart } from "@/lib/server/gear/save-part";
import { createSetup, retireSetup, SETUPS_MAX, updateSetup } from "@/lib/server/gear/save-setup";
import { getPart, getSetup, lastUsedSetup, listParts, listSetups } from "@/lib/server/gear/read-gear";
import { setGearSpans } from "@/lib/server/gear/set-gear-spans";
import { FRONT_WING, makeSetup, REAR_WING } from "@/tests/support/gear-rows";
import { makeSession } from "@/tests/support/session-rows";
import { makeUser, openTestDatabase, TEST_NOW_MS, testContext } from "@/tests/support/test-database";

let db: Database;
let close: () => Promise<void>;
let rider: ReturnType<typeof testContext>;
let stranger: ReturnType<typeof testContext>;
let anonymous: ReturnType<typeof testContext>;

beforeAll(async () => {
  ({ db, close } = await openTestDatabase());
  rider = testContext(db, { userId: (await makeUser(db)).id });
  stranger = testContext(db, { userId: (await makeUser(db)).id });
  anonymous = testContext(db);
});
afterAll(() => close());

const riderId = () => (rider.actor.kind === "user" ? rider.actor.userId : "");

describe("parts", () => {
  it("keep their dimensions and leave an audit line", async () => {
    const part = await createPart(rider, FRONT_WING);
    expect((await getPart(rider, part.id)).dimensions).toEqual({ areaM2: 0.09, spanM: 0.85 });
    const lines = await db.read.select().from(auditLog).where(eq(auditLog.subjectId, part.id));
    expect(lines.map((line) => line.action)).toEqual(["part.create"]);
  });

  it("say which field is wrong and in which unit", async () => {
    const far = { ...FRONT_WING, dimensions: { areaM2: 9, spanM: 0.85 } };
    await expect(createPart(rider, far)).rejects.toMatchObject({
      code: "validation",
      fields: { areaM2: "Area must be between 50 and 4000 cm²." },
    });
  });

  it("refuse a number that is none, a missing required one and an unknown key", async () => {
    const text = { ...FRONT_WING, dimensions: { areaM2: "wide", spanM: 0.85 } };
    await expect(createPart(rider, text)).rejects.toMatchObject({
      fields: { areaM2: "Enter the area in cm²." },
    });
    const missing = { ...FRONT_WING, dimensions: { areaM2: 0.09, spanM: null } };
    await expect(createPart(rider, missing)).rejects.toMatchObject({
      fields: { spanM: "Enter the span in mm." },
    });
    await expect(createPart(rider, { ...FRONT_WING, ownerId: "x" })).rejects.toMatchObject({
      code: "validation",
    });
  });

  it("accept both ends of their range in spite of unit conversion", async () => {
    for (const areaM2 of [50 * 1e-4, 4000 * 1e-4]) {
      const part = await createPart(rider, { ...FRONT_WING, dimensions: { areaM2, spanM: 0.85 } });
      expect(part.dimensions.areaM2).toBe(areaM2);
    }
  });

  it("are not found for a stranger, whatever the verb", async () => {
    const part = await createPart(rider, FRONT_WING);
    await expect(getPart(stranger, part.id)).rejects.toMatchObject({ code: "not_found" });
    await expect(updatePart(stranger, part.id, FRONT_WING)).rejects.toMatchObject({ code: "not_found" });
    await expect(retirePart(stranger, part.id, true)).rejects.toMatchObject({ code: "not_found" });
    expect((await getPart(rider, part.id)).retiredAtMs).toBeNull();
    expect((await listParts(stranger)).map((row) => row.id)).not.toContain(part.id);
  });

  it("need a sign-in", async () => {
    await expect(createPart(anonymous, FRONT_WING)).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(listParts(anonymous)).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(updatePart(anonymous, "x", FRONT_WING)).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(retirePart(anonymous, "x", true)).rejects.toMatchObject({ code: "unauthenticated" });
  });

  it("change their dimensions but never their kind, and retire without loss", async () => {
    const part = await createPart(rider, FRONT_WING);
    await updatePart(rider, part.id, { ...FRONT_WING, model: "Long-rail 900" });
    expect((await getPart(rider, part.id)).model).toBe("Long-rail 900");
    await expect(updatePart(rider, part.id, REAR_WING)).rejects.toMatchObject({ code: "precondition" });
    await retirePart(rider, part.id, true);
    expect((await getPart(rider, part.id)).retiredAtMs).toBe(TEST_NOW_MS);
    await retirePart(rider, part.id, false);
    expect((await getPart(rider, part.id)).retiredAtMs).toBeNull();
  });
});

describe("setups", () => {
  it("are copied with one change and remember what they came from", async () => {
    const { wing, setup } = await makeSetup(rider);
    const copy = await createSetup(
      rider,
      { name: "Half shim", frontWingId: wing.id, shimStackDeg: 0.5 },
      setup.id,
    );
    expect(await getSetup(rider, copy.id)).toMatchObject({ copiedFromId: setup.id, shimStackDeg: 0.5 });
  });

  it("refuse a part of another rider, a part of the wrong kind, and a missing front wing", async () => {
    const theirs = await createPart(stranger, FRONT_WING);
    const rear = await createPart(rider, REAR_WING);
    const problem = { code: "validation", fields: { frontWingId: "Choose a part from your quiver." } };
    await expect(createSetup(rider, { name: "S", frontWingId: theirs.id })).rejects.toMatchObject(problem);
    await expect(createSetup(rider, { name: "S", frontWingId: rear.id })).rejects.toMatchObject(problem);
    await expect(createSetup(rider, { name: "S", frontWingId: null })).rejects.toMatchObject({
      fields: { frontWingId: "Choose the front wing." },
    });
  });

  it("are not found for a stranger and need a sign-in", async () => {
    const { wing, setup } = await makeSetup(rider);
    const input = { name: "Mine now", frontWingId: wing.id };
    await expect(getSetup(stranger, setup.id)).rejects.toMatchObject({ code: "not_found" });
    await expect(updateSetup(stranger, setup.id, input)).rejects.toMatchObject({ code: "not_found" });
    await expect(retireSetup(stranger, setup.id, true)).rejects.toMatchObject({ code: "not_found" });
    const own = await createPart(stranger, FRONT_WING);
    await expect(createSetup(stranger, { name: "S", frontWingId: own.id }, setup.id)).rejects.toMatchObject({
      code: "not_found",
    });
    await expect(createSetup(anonymous, input)).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(updateSetup(anonymous, setup.id, input)).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(retireSetup(anonymous, setup.id, true)).rejects.toMatchObject({ code: "unauthenticated" });
    expect((await getSetup(rider, setup.id)).name).toBe("Long rail");
  });

  it("change and retire", async () => {
    const { wing, setup } = await makeSetup(rider);
    await updateSetup(rider, setup.id, {
      name: "Long rail, mast forward",
      frontWingId: wing.id,
      mastPositionMm: 60,
    });
    await retireSetup(rider, setup.id, true);
    expect(await getSetup(rider, setup.id)).toMatchObject({ mastPositionMm: 60, retiredAtMs: TEST_NOW_MS });
    await retireSetup(rider, setup.id, false);
    expect((await getSetup(rider, setup.id)).retiredAtMs).toBeNull();
  });
});

describe("gear spans", () => {
  const startMs = Date.UTC(2025, 5, 14, 11);
  const half = startMs + 600_000;

  it("cover the session, each with figures of its own", async () => {
    const a = await makeSetup(rider, "A");
    const b = await makeSetup(rider, "B");
    const made = await makeSession(db, riderId(), { startMs });
    await setGearSpans(rider, made.id, [
      { setupId: b.setup.id, startMs: half, endMs: null },
      { setupId: a.setup.id, startMs: null, endMs: half },
    ]);
    const rows = await db.read.select().from(sessionFigures).where(eq(sessionFigures.sessionId, made.id));
    const spans = rows.filter((row) => row.spanId !== "").sort((x, y) => x.startMs - y.startMs);
    expect(spans.map((row) => [row.setupId, row.startMs])).toEqual([
      [a.setup.id, startMs],
      [b.setup.id, half],
    ]);
    // 600 s at 8 m/s in each half; one sample's way of tolerance at the cut.
    for (const row of spans) expect(Math.abs(row.onFoilDistanceM - 4800)).toBeLessThanOrEqual(8);
    expect(rows.find((row) => row.spanId === "")?.setupId).toBeNull();
    expect(await lastUsedSetup(rider)).toEqual({ id: b.setup.id, name: "B" });
    expect((await listSetups(rider)).find((row) => row.id === b.setup.id)?.spans).toBe(1);
  });

  it("replace what was said before; an empty list takes every tag away", async () => {
    const { setup } = await makeSetup(rider);
    const made = await makeSession(db, riderId(), { startMs: startMs + 86_400_000 });
    const whole = [{ setupId: setup.id, startMs: null, endMs: null }];
    await setGearSpans(rider, made.id, whole);
    await setGearSpans(rider, made.id, whole);
    const rows = () => db.read.select().from(sessionFigures).where(eq(sessionFigures.sessionId, made.id));
    expect((await rows()).map((row) => row.setupId)).toEqual([setup.id, setup.id]);
    await setGearSpans(rider, made.id, []);
    expect((await rows()).map((row) => row.setupId)).toEqual([null]);
  });

  it("refuse to overlap, to lie outside the session, and to name somebody else's setup", async () => {
    const { setup } = await makeSetup(rider);
    const theirs = await makeSetup(stranger);
    const made = await makeSession(db, riderId(), { startMs });
    const id = setup.id;
    const overlap = [
      { setupId: id, startMs: null, endMs: half + 1000 },
      { setupId: id, startMs: half, endMs: null },
    ];
    await expect(setGearSpans(rider, made.id, overlap)).rejects.toMatchObject({ code: "validation" });
    const after = [{ setupId: id, startMs: startMs + 9e6, endMs: startMs + 9.1e6 }];
    await expect(setGearSpans(rider, made.id, after)).rejects.toMatchObject({ code: "validation" });
    const foreign = [{ setupId: theirs.setup.id, startMs: null, endMs: null }];
    await expect(setGearSpans(rider, made.id, foreign)).rejects.toMatchObject({ code: "validation" });
    const own = [{ setupId: id, startMs: null, endMs: null }];
    await expect(setGearSpans(stranger, made.id, own)).rejects.toMatchObject({ code: "not_found" });
    await expect(setGearSpans(anonymous, made.id, own)).rejects.toMatchObject({ code: "unauthenticated" });
  });
});

describe("the quiver", () => {
  it("takes 1000 parts and 1000 setups of one rider, and says why no more", async () => {
    const collector = testContext(db, { userId: (await makeUser(db)).id });
    const { wing, setup: first } = await makeSetup(collector);
    const copies = Array.from({ length: PARTS_MAX - 1 }, (_, n) => n);
    await db.write(async (tx) => {
      await tx.insert(part).values(copies.map((n) => ({ ...wing, id: `part-${n}` })));
      await tx.insert(setup).values(copies.map((n) => ({ ...first, id: `setup-${n}` })));
    });
    await expect(createPart(collector, FRONT_WING)).rejects.toMatchObject({ code: "limit_exceeded" });
    expect(SETUPS_MAX).toBe(PARTS_MAX);
    await expect(createSetup(collector, { name: "One more", frontWingId: wing.id })).rejects.toMatchObject({
      code: "limit_exceeded",
    });
    // Other riders have room of their own.
    await createPart(stranger, FRONT_WING);
  });

  it("keeps text as it was typed, and refuses what the database would cut short", async () => {
    const model = "\u202e\u{1f3c4} 'x'); DROP TABLE part; --\r\n%00";
    const odd = await createPart(rider, { ...FRONT_WING, model });
    expect((await getPart(rider, odd.id)).model).toBe(model);
    const cut = createPart(rider, { ...FRONT_WING, model: "Long-rail\u0000 850" });
    await expect(cut).rejects.toMatchObject({ code: "validation", fields: { model: expect.any(String) } });
    const inside = { ...FRONT_WING, dimensions: { areaM2: 0.09, spanM: 0.85, profile: "a\u0000" } };
    await expect(createPart(rider, inside)).rejects.toMatchObject({
      fields: { profile: expect.any(String) },
    });
  });
});
