import { eq } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { user } from "@/db/schema/user";
import { at } from "@/lib/errors/invariant";
import { changeEmail } from "@/lib/server/accounts/change-email";
import { changePassword } from "@/lib/server/accounts/change-password";
import { confirmEmail } from "@/lib/server/accounts/confirm-email";
import { requestPasswordReset } from "@/lib/server/accounts/request-password-reset";
import { isResetLinkAlive, resetPassword } from "@/lib/server/accounts/reset-password";
import { signIn } from "@/lib/server/accounts/sign-in";
import { signUp } from "@/lib/server/accounts/sign-up";
import { validateSignIn } from "@/lib/server/auth/sign-ins";
import { letters, makeAccount, PASSWORD, signedIn, tokenIn } from "@/tests/support/accounts";
import { openTestDatabase, testContext, TEST_NOW_MS } from "@/tests/support/test-database";

const HOUR_MS = 3_600_000;
const EMAIL = "aske@riders.example";
const NEW_PASSWORD = "three gulls over Slettestrand";

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

const enter = (password: string, email = EMAIL) => signIn(testContext(db), { email, password }, "Test");
const isAlive = async (token: string) => (await validateSignIn(db, token, TEST_NOW_MS)) !== null;

describe("requestPasswordReset and resetPassword", () => {
  const link = async () => {
    await requestPasswordReset(testContext(db), { email: EMAIL });
    return tokenIn(at(await letters(db), -1 + (await letters(db)).length).body);
  };

  test("sets the new password once, ends every sign-in and signs the owner in", async () => {
    await makeAccount(db, { email: EMAIL, emailConfirmedAtMs: null });
    const before = await signedIn(db, EMAIL);
    const token = await link();
    const made = await resetPassword(testContext(db), { token, password: NEW_PASSWORD }, "Test");
    expect(await isAlive(before.token)).toBe(false);
    expect(await isAlive(made.token)).toBe(true);
    await enter(NEW_PASSWORD);
    await expect(enter(PASSWORD)).rejects.toMatchObject({ code: "unauthenticated" });
    const again = resetPassword(testContext(db), { token, password: "another one entirely" }, "Test");
    await expect(again).rejects.toMatchObject({ code: "precondition" });
    await enter(NEW_PASSWORD);
  });

  test("two uses of one link at the same moment set one password", async () => {
    await makeAccount(db, { email: EMAIL });
    const token = await link();
    const uses = ["first of the two words", "second of the two words"].map((password) =>
      resetPassword(testContext(db), { token, password }, "Test"),
    );
    const outcomes = (await Promise.allSettled(uses)).map((use) => use.status).sort();
    expect(outcomes).toEqual(["fulfilled", "rejected"]);
  });

  test("confirms the address by the way and tells the owner of the change", async () => {
    const { id } = await makeAccount(db, { email: EMAIL, emailConfirmedAtMs: null });
    await resetPassword(testContext(db), { token: await link(), password: NEW_PASSWORD }, "Test");
    const [row] = await db.read.select().from(user).where(eq(user.id, id));
    expect(row?.emailConfirmedAtMs).toBe(TEST_NOW_MS);
    expect((await letters(db)).map((letter) => letter.subject)).toContain(
      "Your password for Trimwake was changed",
    );
  });

  test("the link is dead after one hour and when a newer one was asked for", async () => {
    await makeAccount(db, { email: EMAIL });
    const first = await link();
    const late = testContext(db, { nowMs: TEST_NOW_MS + HOUR_MS });
    expect(await isResetLinkAlive(late, first)).toBe(false);
    const use = resetPassword(late, { token: first, password: NEW_PASSWORD }, "Test");
    await expect(use).rejects.toMatchObject({ code: "precondition" });
    expect(await isResetLinkAlive(testContext(db), first)).toBe(true);
    await link();
    expect(await isResetLinkAlive(testContext(db), first)).toBe(false);
  });

  test("a refused password does not use the link up", async () => {
    await makeAccount(db, { email: EMAIL });
    const token = await link();
    const use = resetPassword(testContext(db), { token, password: "sunshine" }, "Test");
    await expect(use).rejects.toMatchObject({ fields: { password: expect.any(String) } });
    expect(await isResetLinkAlive(testContext(db), token)).toBe(true);
  });

  test("a link to confirm an address sets no password", async () => {
    await makeAccount(db, { email: EMAIL });
    const { ctx } = await signedIn(db, EMAIL);
    await changeEmail(ctx, { email: "new@riders.example", currentPassword: PASSWORD });
    const token = tokenIn(at(await letters(db), 0).body);
    const use = resetPassword(testContext(db), { token, password: NEW_PASSWORD }, "Test");
    await expect(use).rejects.toMatchObject({ code: "precondition" });
  });

  test("says nothing of whether the address is known, and sends nothing to strangers", async () => {
    expect(await requestPasswordReset(testContext(db), { email: "no@riders.example" })).toBeUndefined();
    expect(await letters(db)).toHaveLength(0);
  });

  test("is limited by mailbox and by where it is asked from", async () => {
    for (let n = 0; n < 5; n += 1) await requestPasswordReset(testContext(db), { email: EMAIL });
    const sixth = requestPasswordReset(testContext(db), { email: EMAIL });
    await expect(sixth).rejects.toMatchObject({ code: "limit_exceeded" });
    const from = testContext(db, { address: "192.0.2.7" });
    for (let n = 0; n < 20; n += 1) await requestPasswordReset(from, { email: `r${n}@riders.example` });
    const next = requestPasswordReset(from, { email: "r20@riders.example" });
    await expect(next).rejects.toMatchObject({ code: "limit_exceeded" });
    const elsewhere = testContext(db, { address: "192.0.2.8" });
    expect(await requestPasswordReset(elsewhere, { email: "r20@riders.example" })).toBeUndefined();
  });

  test("a stranger's sign-ups and guesses do not block the owner's way back in", async () => {
    await makeAccount(db, { email: EMAIL });
    const form = { email: EMAIL, password: "a long river runs", name: "Nobody", weight: "" };
    for (let n = 0; n < 5; n += 1) await signUp(testContext(db), form);
    await expect(signUp(testContext(db), form)).rejects.toMatchObject({ code: "limit_exceeded" });
    const guess = () => signIn(testContext(db), { email: EMAIL, password: "guess" }, "Test");
    for (let n = 0; n < 6; n += 1) await guess().catch(() => undefined);
    await requestPasswordReset(testContext(db), { email: EMAIL });
    const token = tokenIn(at(await letters(db), 5).body);
    await resetPassword(testContext(db), { token, password: NEW_PASSWORD }, "Test");
  });

  test("whoever may ask for no more links has one that works", async () => {
    await makeAccount(db, { email: EMAIL });
    for (let n = 0; n < 5; n += 1) await requestPasswordReset(testContext(db), { email: EMAIL });
    const lastMinute = testContext(db, { nowMs: TEST_NOW_MS + 59 * 60_000 });
    await expect(requestPasswordReset(lastMinute, { email: EMAIL })).rejects.toMatchObject({
      code: "limit_exceeded",
    });
    expect(await isResetLinkAlive(lastMinute, tokenIn(at(await letters(db), 4).body))).toBe(true);
  });

  test("refuses an address that is none", async () => {
    await expect(requestPasswordReset(testContext(db), { email: "@" })).rejects.toMatchObject({
      code: "validation",
    });
  });
});

describe("changePassword", () => {
  const change = (over: Record<string, unknown> = {}) => ({
    currentPassword: PASSWORD,
    newPassword: NEW_PASSWORD,
    endOthers: false,
    ...over,
  });

  test("gives this sign-in a new token, kills the old one and leaves the others", async () => {
    await makeAccount(db, { email: EMAIL });
    const here = await signedIn(db, EMAIL);
    const elsewhere = await signedIn(db, EMAIL);
    const { token, ended } = await changePassword(here.ctx, change(), "Test");
    expect(ended).toBe(0);
    expect(await isAlive(here.token)).toBe(false);
    expect(await isAlive(token)).toBe(true);
    expect(await isAlive(elsewhere.token)).toBe(true);
    await enter(NEW_PASSWORD);
  });

  test("ends the others when asked to", async () => {
    await makeAccount(db, { email: EMAIL });
    const here = await signedIn(db, EMAIL);
    const elsewhere = await signedIn(db, EMAIL);
    const { token, ended } = await changePassword(here.ctx, change({ endOthers: true }), "Test");
    expect(ended).toBe(1);
    expect(await isAlive(elsewhere.token)).toBe(false);
    expect(await isAlive(token)).toBe(true);
  });

  test("makes links to reset the password useless", async () => {
    await makeAccount(db, { email: EMAIL });
    await requestPasswordReset(testContext(db), { email: EMAIL });
    const token = tokenIn(at(await letters(db), 0).body);
    await changePassword((await signedIn(db, EMAIL)).ctx, change(), "Test");
    expect(await isResetLinkAlive(testContext(db), token)).toBe(false);
  });

  test("asks for the password of today, and slows guessing it as at sign-in", async () => {
    await makeAccount(db, { email: EMAIL });
    const { ctx } = await signedIn(db, EMAIL);
    for (let n = 0; n < 5; n += 1) {
      await expect(changePassword(ctx, change({ currentPassword: "guess" }), "Test")).rejects.toMatchObject({
        fields: { currentPassword: expect.any(String) },
      });
    }
    await expect(changePassword(ctx, change(), "Test")).rejects.toMatchObject({ code: "limit_exceeded" });
  });

  test("is not slowed by a stranger who guesses at sign-in", async () => {
    await makeAccount(db, { email: EMAIL });
    const { ctx } = await signedIn(db, EMAIL);
    const guess = () => signIn(testContext(db), { email: EMAIL, password: "guess" }, "Test");
    for (let n = 0; n < 8; n += 1) await guess().catch(() => undefined);
    await expect(guess()).rejects.toMatchObject({ code: "limit_exceeded" });
    const { token } = await changePassword(ctx, change(), "Test");
    expect(await isAlive(token)).toBe(true);
  });

  test("does not change somebody else's password, whatever is sent along", async () => {
    const owner = await makeAccount(db, { email: EMAIL });
    const other = await makeAccount(db, { email: "other@riders.example" });
    const { ctx } = await signedIn(db, EMAIL);
    await expect(changePassword(ctx, change({ userId: other.id }), "Test")).rejects.toMatchObject({
      code: "validation",
    });
    await changePassword(ctx, change(), "Test");
    const rows = await db.read.select().from(user).where(eq(user.id, other.id));
    expect(at(rows, 0).passwordHash).toBe(other.passwordHash);
    expect(owner.id).not.toBe(other.id);
  });

  test("needs somebody signed in", async () => {
    await expect(changePassword(testContext(db), change(), "Test")).rejects.toMatchObject({
      code: "unauthenticated",
    });
  });
});

describe("changeEmail", () => {
  const form = { email: "New@riders.example", currentPassword: PASSWORD };

  test("takes effect when the new mailbox confirms it, and tells the old one", async () => {
    const { id } = await makeAccount(db, { email: EMAIL });
    const { ctx } = await signedIn(db, EMAIL);
    await changeEmail(ctx, form);
    const emailOf = async () => at(await db.read.select().from(user).where(eq(user.id, id)), 0).email;
    expect(await emailOf()).toBe(EMAIL);
    const [first] = await letters(db);
    expect(first?.recipient).toBe("new@riders.example");
    await confirmEmail(testContext(db), { token: tokenIn(first?.body ?? "") });
    expect(await emailOf()).toBe("new@riders.example");
    expect((await letters(db)).map((letter) => letter.recipient)).toContain(EMAIL);
    await enter(PASSWORD, "new@riders.example");
  });

  test("does not tell on the screen that an address is taken, and takes nothing", async () => {
    await makeAccount(db, { email: EMAIL });
    await makeAccount(db, { email: "new@riders.example" });
    const { ctx } = await signedIn(db, EMAIL);
    expect(await changeEmail(ctx, form)).toBeUndefined();
    expect((await letters(db)).map((letter) => letter.body).join("")).not.toContain("token=");
  });

  test("loses to somebody who took the address meanwhile", async () => {
    await makeAccount(db, { email: EMAIL });
    await changeEmail((await signedIn(db, EMAIL)).ctx, form);
    const token = tokenIn(at(await letters(db), 0).body);
    await makeAccount(db, { email: "new@riders.example" });
    await expect(confirmEmail(testContext(db), { token })).rejects.toMatchObject({ code: "precondition" });
  });

  test("needs somebody signed in, the password of today and another address", async () => {
    await makeAccount(db, { email: EMAIL });
    const { ctx } = await signedIn(db, EMAIL);
    await expect(changeEmail(testContext(db), form)).rejects.toMatchObject({ code: "unauthenticated" });
    await expect(changeEmail(ctx, { ...form, currentPassword: "x" })).rejects.toMatchObject({
      fields: { currentPassword: expect.any(String) },
    });
    await expect(changeEmail(ctx, { ...form, email: EMAIL })).rejects.toMatchObject({
      fields: { email: expect.any(String) },
    });
  });
});
