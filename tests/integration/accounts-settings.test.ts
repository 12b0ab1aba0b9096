import { eq } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { auditLog } from "@/db/schema/audit-log";
import { user } from "@/db/schema/user";
import { at } from "@/lib/errors/invariant";
import { endOtherSignIns } from "@/lib/server/accounts/end-other-sign-ins";
import { endSignIn } from "@/lib/server/accounts/end-sign-in";
import { listSignIns } from "@/lib/server/accounts/list-sign-ins";
import { updateProfile } from "@/lib/server/accounts/update-profile";
import { updateTheme } from "@/lib/server/accounts/update-theme";
import { updateUnits } from "@/lib/server/accounts/update-units";
import { tokenHash } from "@/lib/server/auth/token";
import { validateSignIn } from "@/lib/server/auth/sign-ins";
import { makeAccount, signedIn } from "@/tests/support/accounts";
import { makeUser, openTestDatabase, testContext, TEST_NOW_MS } from "@/tests/support/test-database";

const EMAIL = "aske@riders.example";
const OTHER = "other@riders.example";

let db: Database;
let close: () => Promise<void>;

beforeEach(async () => {
  vi.spyOn(process.stdout, "write").mockReturnValue(true);
  vi.useFakeTimers({ toFake: ["Date"], now: TEST_NOW_MS });
  ({ db, close } = await openTestDatabase());
});
afterEach(async () => {
  vi.useRealTimers();
  await close();
});

const rowOf = async (id: string) => at(await db.read.select().from(user).where(eq(user.id, id)), 0);
const isAlive = async (token: string) => (await validateSignIn(db, token, TEST_NOW_MS)) !== null;

describe("listSignIns", () => {
  test("lists one's own sign-ins alone, this one first and marked", async () => {
    await makeAccount(db, { email: EMAIL });
    await makeAccount(db, { email: OTHER });
    const here = await signedIn(db, EMAIL, { device: "Firefox on Linux" });
    await signedIn(db, EMAIL, { device: "Safari on iPhone" });
    await signedIn(db, OTHER, { device: "Chrome on Windows" });
    const list = await listSignIns(here.ctx);
    expect(list.map(({ device, isThisOne }) => [device, isThisOne])).toEqual([
      ["Firefox on Linux", true],
      ["Safari on iPhone", false],
    ]);
  });

  test("needs somebody signed in", async () => {
    await expect(listSignIns(testContext(db))).rejects.toMatchObject({ code: "unauthenticated" });
  });
});

describe("endSignIn", () => {
  test("ends one of one's own", async () => {
    await makeAccount(db, { email: EMAIL });
    const here = await signedIn(db, EMAIL);
    const lost = await signedIn(db, EMAIL);
    await endSignIn(here.ctx, { id: tokenHash(lost.token) });
    expect(await isAlive(lost.token)).toBe(false);
    expect(await isAlive(here.token)).toBe(true);
  });

  test("does not see somebody else's", async () => {
    await makeAccount(db, { email: EMAIL });
    await makeAccount(db, { email: OTHER });
    const here = await signedIn(db, EMAIL);
    const theirs = await signedIn(db, OTHER);
    await expect(endSignIn(here.ctx, { id: tokenHash(theirs.token) })).rejects.toMatchObject({
      code: "not_found",
    });
    expect(await isAlive(theirs.token)).toBe(true);
  });

  test("needs somebody signed in and an id that is one", async () => {
    await makeAccount(db, { email: EMAIL });
    const here = await signedIn(db, EMAIL);
    const id = tokenHash(here.token);
    await expect(endSignIn(testContext(db), { id })).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(endSignIn(here.ctx, { id: "1 OR 1=1" })).rejects.toMatchObject({ code: "validation" });
    expect(await isAlive(here.token)).toBe(true);
  });
});

describe("endOtherSignIns", () => {
  test("ends all of one's own but this one, and nobody else's", async () => {
    await makeAccount(db, { email: EMAIL });
    await makeAccount(db, { email: OTHER });
    const here = await signedIn(db, EMAIL);
    const others = [await signedIn(db, EMAIL), await signedIn(db, EMAIL)];
    const theirs = await signedIn(db, OTHER);
    expect(await endOtherSignIns(here.ctx)).toBe(2);
    expect(await Promise.all(others.map(({ token }) => isAlive(token)))).toEqual([false, false]);
    expect(await Promise.all([here, theirs].map(({ token }) => isAlive(token)))).toEqual([true, true]);
  });

  test("needs somebody signed in", async () => {
    await expect(endOtherSignIns(testContext(db))).rejects.toMatchObject({ code: "unauthenticated" });
  });
});

describe("updateProfile", () => {
  test.each([
    ["82,5", 82.5],
    [" 82.5 kg", 82.5],
    ["", null],
  ])("reads the weight %j as %j kilograms", async (weight, weightKg) => {
    const { id } = await makeUser(db, { weightKg: 90 });
    await updateProfile(testContext(db, { userId: id }), { name: "Aske Holm", weight });
    expect(await rowOf(id)).toMatchObject({ name: "Aske Holm", weightKg });
    expect(await db.read.select().from(auditLog)).toHaveLength(1);
  });

  test("changes nobody else, whatever is sent along", async () => {
    const me = await makeUser(db);
    const other = await makeUser(db);
    const ctx = testContext(db, { userId: me.id });
    await expect(updateProfile(ctx, { id: other.id, name: "X", weight: "" })).rejects.toMatchObject({
      code: "validation",
    });
    await updateProfile(ctx, { name: "X", weight: "" });
    expect(await rowOf(other.id)).toEqual(other);
  });

  test.each([
    ["name", { name: "", weight: "" }],
    ["name", { name: "x".repeat(81), weight: "" }],
    ["name", { name: "a\u0007b", weight: "" }],
    ["weight", { name: "Aske", weight: "82.5.1" }],
    ["weight", { name: "Aske", weight: "1e2" }],
    ["weight", { name: "Aske", weight: "-82" }],
  ])("names the field %s in %o", async (field, input) => {
    const me = await makeUser(db);
    await expect(updateProfile(testContext(db, { userId: me.id }), input)).rejects.toMatchObject({
      fields: { [field]: expect.any(String) },
    });
    expect(await rowOf(me.id)).toEqual(me);
  });

  test("needs somebody signed in whose account is still there", async () => {
    const input = { name: "Aske", weight: "" };
    await expect(updateProfile(testContext(db), input)).rejects.toMatchObject({ code: "unauthenticated" });
    const gone = testContext(db, { userId: "gone" });
    await expect(updateProfile(gone, input)).rejects.toMatchObject({ code: "unauthenticated" });
  });
});

describe("updateUnits and updateTheme", () => {
  test("keep one's own choice and nobody else's", async () => {
    const me = await makeUser(db);
    const other = await makeUser(db);
    const ctx = testContext(db, { userId: me.id });
    await updateUnits(ctx, { speed: "km/h", distance: "NM" });
    await updateTheme(ctx, { theme: "dark" });
    expect(await rowOf(me.id)).toMatchObject({ speedUnit: "km/h", distanceUnit: "NM", theme: "dark" });
    expect(await rowOf(other.id)).toEqual(other);
  });

  test("refuse what is no choice", async () => {
    const me = await makeUser(db);
    const ctx = testContext(db, { userId: me.id });
    await expect(updateUnits(ctx, { speed: "furlong", distance: "km" })).rejects.toMatchObject({
      fields: { speed: "Choose a unit for speeds." },
    });
    await expect(updateTheme(ctx, { theme: "pink" })).rejects.toMatchObject({
      fields: { theme: expect.any(String) },
    });
  });

  test("need somebody signed in", async () => {
    const units = updateUnits(testContext(db), { speed: "kn", distance: "km" });
    await expect(units).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(updateTheme(testContext(db), { theme: "dark" })).rejects.toMatchObject({
      code: "unauthenticated",
    });
  });
});
