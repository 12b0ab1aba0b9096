import { eq } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import * as argon2 from "@node-rs/argon2";
import type { Database } from "@/db/client";
import { authSession } from "@/db/schema/auth-session";
import { user } from "@/db/schema/user";
import { at } from "@/lib/errors/invariant";
import { signIn } from "@/lib/server/accounts/sign-in";
import { signOut } from "@/lib/server/accounts/sign-out";
import { signUp } from "@/lib/server/accounts/sign-up";
import { requestPasswordReset } from "@/lib/server/accounts/request-password-reset";
import { tokenHash } from "@/lib/server/auth/token";
import { CLOCK_SLACK_MS, sweepSignIns, validateSignIn } from "@/lib/server/auth/sign-ins";
import { makeAccount, PASSWORD, signedIn } from "@/tests/support/accounts";
import { openTestDatabase, testContext, TEST_NOW_MS } from "@/tests/support/test-database";

vi.mock("@node-rs/argon2", async (original) => {
  const real = await original<typeof argon2>();
  return { ...real, hash: vi.fn(real.hash), verify: vi.fn(real.verify) };
});

const DAY_MS = 86_400_000;
const EMAIL = "aske@riders.example";

let db: Database;
let close: () => Promise<void>;
let lines: string[];

beforeEach(async () => {
  lines = [];
  vi.spyOn(process.stdout, "write").mockImplementation((line) => {
    lines.push(String(line));
    return true;
  });
  // Lucia asks the system's clock.
  vi.useFakeTimers({ toFake: ["Date"], now: TEST_NOW_MS });
  ({ db, close } = await openTestDatabase());
});
afterEach(async () => {
  vi.useRealTimers();
  await close();
});

const attempt = (password: string, email = EMAIL) => signIn(testContext(db), { email, password }, "Test");
const refusal = async (work: Promise<unknown>) =>
  work.then(
    () => "let in",
    (error: unknown) => (error instanceof Error ? `${error.name}: ${error.message}` : "?"),
  );

describe("signIn", () => {
  test("gives a token of 256 bits of which the table holds the hash", async () => {
    const owner = await makeAccount(db, { email: EMAIL });
    const { token, userId } = await attempt(PASSWORD, " ASKE@riders.example");
    expect(userId).toBe(owner.id);
    expect(Buffer.from(token, "base64url")).toHaveLength(32);
    expect((await db.read.select().from(authSession)).map((row) => row.id)).toEqual([tokenHash(token)]);
    expect(await validateSignIn(db, token, TEST_NOW_MS)).toEqual({
      userId: owner.id,
      authSessionId: tokenHash(token),
    });
  });

  test("lets an account in whose address is not confirmed yet", async () => {
    await makeAccount(db, { email: EMAIL, emailConfirmedAtMs: null });
    expect((await attempt(PASSWORD)).token).toHaveLength(43);
  });

  test("answers a wrong password and an unknown address alike and does the same work for both", async () => {
    await makeAccount(db, { email: EMAIL });
    vi.mocked(argon2.verify).mockClear();
    const wrong = await refusal(attempt("not the password"));
    const callsForWrong = vi.mocked(argon2.verify).mock.calls.length;
    vi.mocked(argon2.verify).mockClear();
    const unknown = await refusal(attempt(PASSWORD, "nobody@riders.example"));
    const callsForUnknown = vi.mocked(argon2.verify).mock.calls.map(([hash]) => String(hash));
    expect(wrong).toBe("AppError: The e-mail address or the password is not right.");
    expect(unknown).toBe(wrong);
    expect(callsForWrong).toBe(1);
    expect(callsForUnknown).toHaveLength(1);
    expect(at(callsForUnknown, 0)).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  test("does the same hashing at sign-up and none at reset, whether the address is known or not", async () => {
    await makeAccount(db, { email: EMAIL });
    const form = { password: PASSWORD, name: "Aske", weight: "" };
    const counts: number[] = [];
    for (const email of [EMAIL, "new@riders.example"]) {
      vi.mocked(argon2.hash).mockClear();
      await signUp(testContext(db), { ...form, email });
      counts.push(vi.mocked(argon2.hash).mock.calls.length);
      vi.mocked(argon2.hash).mockClear();
      await requestPasswordReset(testContext(db), { email });
      counts.push(vi.mocked(argon2.hash).mock.calls.length);
    }
    expect(counts).toEqual([1, 0, 1, 0]);
  });

  test("tells passwords of 100 characters apart by the last one, with spaces and emoji", async () => {
    const long = `${"to the wind ".repeat(8)}🌊12`;
    expect([...long]).toHaveLength(99);
    const passwordHash = await argon2.hash(`${long}a`, { memoryCost: 19456, timeCost: 2, parallelism: 1 });
    await makeAccount(db, { email: EMAIL, passwordHash });
    expect(await refusal(attempt(`${long}b`))).toContain("not right");
    expect((await attempt(`${long}a`)).token).toHaveLength(43);
  });

  test("hashes anew what was hashed with less effort, and the password still fits", async () => {
    const weak = await argon2.hash(PASSWORD, { memoryCost: 8192, timeCost: 1, parallelism: 1 });
    const { id } = await makeAccount(db, { email: EMAIL, passwordHash: weak });
    await attempt(PASSWORD);
    const [row] = await db.read.select().from(user).where(eq(user.id, id));
    expect(row?.passwordHash).toMatch(/\$m=19456,t=2,p=1\$/);
    await attempt(PASSWORD);
  });

  test("ends the sign-in the same browser held before", async () => {
    await makeAccount(db, { email: EMAIL });
    const first = await signedIn(db, EMAIL);
    await signIn(first.ctx, { email: EMAIL, password: PASSWORD }, "Test");
    expect(await validateSignIn(db, first.token, TEST_NOW_MS)).toBeNull();
  });

  test.each([
    ["email", { email: "", password: PASSWORD }],
    ["password", { email: EMAIL, password: "" }],
    ["password", { email: EMAIL, password: "x".repeat(2001) }],
    ["password", { email: EMAIL, password: ["a"] }],
  ])("names the field %s that is missing or cannot be read", async (field, input) => {
    await expect(signIn(testContext(db), input, "Test")).rejects.toMatchObject({
      code: "validation",
      fields: { [field]: expect.any(String) },
    });
  });

  test("logs who came and who was refused, without address, password or token, one line each", async () => {
    await makeAccount(db, { email: EMAIL });
    await refusal(attempt('secret\n{"event":"forged"}'));
    const { token } = await attempt(PASSWORD);
    const text = lines.join("");
    expect(lines.map((line) => JSON.parse(line).event)).toEqual(["sign_in_refused", "sign_in"]);
    for (const secret of [EMAIL, PASSWORD, "forged", token, tokenHash(token)]) {
      expect(text).not.toContain(secret);
    }
  });
});

describe("signOut", () => {
  test("ends the sign-in on the server: the old cookie opens nothing", async () => {
    await makeAccount(db, { email: EMAIL });
    const here = await signedIn(db, EMAIL);
    const elsewhere = await signedIn(db, EMAIL);
    await signOut(here.ctx);
    expect(await validateSignIn(db, here.token, TEST_NOW_MS)).toBeNull();
    expect(await validateSignIn(db, elsewhere.token, TEST_NOW_MS)).not.toBeNull();
  });

  test("is fine with nobody signed in", async () => {
    expect(await signOut(testContext(db))).toBeUndefined();
  });
});

describe("a sign-in's life", () => {
  const later = (ms: number) => {
    vi.setSystemTime(TEST_NOW_MS + ms);
    return TEST_NOW_MS + ms;
  };

  test("ends after 14 days without use", async () => {
    await makeAccount(db, { email: EMAIL });
    const { token } = await signedIn(db, EMAIL);
    expect(await validateSignIn(db, token, later(14 * DAY_MS))).toBeNull();
    expect(await db.read.select().from(authSession)).toHaveLength(0);
  });

  test("is extended by use, yet ends after 90 days all the same", async () => {
    await makeAccount(db, { email: EMAIL });
    const { token } = await signedIn(db, EMAIL);
    for (let day = 8; day < 90; day += 8) {
      expect(await validateSignIn(db, token, later(day * DAY_MS)), `day ${day}`).not.toBeNull();
    }
    expect(await validateSignIn(db, token, later(90 * DAY_MS))).toBeNull();
  });

  test("ends when the clock is set back by a day, and survives a correction of seconds", async () => {
    await makeAccount(db, { email: EMAIL });
    const { token } = await signedIn(db, EMAIL);
    expect(await validateSignIn(db, token, later(-CLOCK_SLACK_MS + 1000))).not.toBeNull();
    expect(await validateSignIn(db, token, later(-DAY_MS))).toBeNull();
  });

  test("ends when it was extended under a clock that ran ahead", async () => {
    await makeAccount(db, { email: EMAIL });
    const { token } = await signedIn(db, EMAIL);
    expect(await validateSignIn(db, token, later(13 * DAY_MS))).not.toBeNull();
    expect(await validateSignIn(db, token, later(DAY_MS))).toBeNull();
  });

  test("ends with the account", async () => {
    const owner = await makeAccount(db, { email: EMAIL });
    const { token } = await signedIn(db, EMAIL);
    await db.write((tx) => tx.delete(user).where(eq(user.id, owner.id)));
    expect(await validateSignIn(db, token, TEST_NOW_MS)).toBeNull();
  });

  test.each(["", "x", "x".repeat(43), "x".repeat(5000), "' OR 1=1 --"])(
    "is not opened by %j",
    async (token) => {
      await makeAccount(db, { email: EMAIL });
      await signedIn(db, EMAIL);
      expect(await validateSignIn(db, token, TEST_NOW_MS)).toBeNull();
    },
  );

  test("is swept away when it is over, and not before", async () => {
    await makeAccount(db, { email: EMAIL });
    await signedIn(db, EMAIL);
    expect(await sweepSignIns(db, TEST_NOW_MS + 14 * DAY_MS - 1000)).toBe(0);
    expect(await sweepSignIns(db, TEST_NOW_MS + 14 * DAY_MS)).toBe(1);
  });
});
