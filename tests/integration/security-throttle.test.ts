import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import * as argon2 from "@node-rs/argon2";
import type { Database } from "@/db/client";
import { throttle } from "@/db/schema/throttle";
import { AppError } from "@/lib/errors/app-error";
import { signIn } from "@/lib/server/accounts/sign-in";
import { countOnce, SIGN_IN_PER_ACCOUNT, sweepThrottle, waitWords } from "@/lib/server/throttle/throttle";
import { makeAccount, PASSWORD } from "@/tests/support/accounts";
import { openTestDatabase, testContext, TEST_NOW_MS } from "@/tests/support/test-database";

// What is counted here are looks at a password, not their cost: 150 real ones would take seconds.
vi.mock("@node-rs/argon2", async (original) => ({
  ...(await original<typeof argon2>()),
  verify: vi.fn(async (_hash: string, password: string) => password === PASSWORD),
}));

const HOUR_MS = 3_600_000;
const EMAIL = "aske@riders.example";

let db: Database;
let close: () => Promise<void>;

beforeEach(async () => {
  vi.spyOn(process.stdout, "write").mockReturnValue(true);
  vi.mocked(argon2.verify).mockClear();
  ({ db, close } = await openTestDatabase());
});
afterEach(() => close());

const looks = () => vi.mocked(argon2.verify).mock.calls.length;

async function attempt(
  password: string,
  from: { nowMs: number; address?: string; email?: string },
): Promise<string> {
  const ctx = testContext(db, { nowMs: from.nowMs, address: from.address ?? null });
  try {
    await signIn(ctx, { email: from.email ?? EMAIL, password }, "Test");
    return "in";
  } catch (error) {
    if (error instanceof AppError) return error.code;
    throw error;
  }
}

describe("wrong passwords on one account", () => {
  test("150 tries one second apart: from the fifth on each waits 1, 2, 4, ... 64 s", async () => {
    await makeAccount(db, { email: EMAIL });
    const looked: number[] = [];
    for (let second = 0; second < 150; second += 1) {
      const before = looks();
      await attempt("guess", { nowMs: TEST_NOW_MS + second * 1000, address: `192.0.2.${second % 200}` });
      if (looks() > before) looked.push(second);
    }
    // Five at once, then after 1, 2, 4, 8, 16, 32 and 64 s.
    expect(looked).toEqual([0, 1, 2, 3, 4, 5, 7, 11, 19, 35, 67, 131]);
  });

  test("the right password works from another address after the wait: nobody is locked out", async () => {
    await makeAccount(db, { email: EMAIL });
    for (let second = 0; second < 150; second += 1) {
      await attempt("guess", { nowMs: TEST_NOW_MS + second * 1000, address: "192.0.2.1" });
    }
    const soon = { nowMs: TEST_NOW_MS + 150_000, address: "198.51.100.9" };
    expect(await attempt(PASSWORD, soon)).toBe("limit_exceeded");
    expect(await attempt(PASSWORD, { ...soon, nowMs: soon.nowMs + 64_000 })).toBe("in");
  });

  test("a guesser who never waits a second too long stays under 100 looks in any hour", async () => {
    // The schedule alone, with the best a guesser can do, over a day.
    const looksAtMs: number[] = [];
    let counter: ReturnType<typeof countOnce> | null = null;
    for (let nowMs = TEST_NOW_MS; nowMs < TEST_NOW_MS + 24 * HOUR_MS;) {
      counter = countOnce(SIGN_IN_PER_ACCOUNT, counter, nowMs);
      looksAtMs.push(nowMs);
      nowMs = Math.max(nowMs + 1, counter.blockedUntilMs);
    }
    const busiest = Math.max(
      ...looksAtMs.map((start) => looksAtMs.filter((at) => at >= start && at < start + HOUR_MS).length),
    );
    // OWASP ASVS 4.0.3, 2.2.1: no more than 100 failed attempts an hour on a single account.
    expect(busiest).toBeLessThanOrEqual(100);
    expect(busiest).toBeGreaterThan(50);
  });

  test("20 tries at the same moment do not slip past together", async () => {
    await makeAccount(db, { email: EMAIL });
    const tries = Array.from({ length: 20 }, () => attempt("guess", { nowMs: TEST_NOW_MS }));
    await Promise.all(tries);
    expect(looks()).toBe(5);
  });

  test("an account that does not exist is slowed in the same way", async () => {
    const codes: string[] = [];
    for (let n = 0; n < 6; n += 1) {
      codes.push(await attempt("guess", { nowMs: TEST_NOW_MS, email: "no@riders.example" }));
    }
    expect(codes).toEqual([...Array<string>(5).fill("unauthenticated"), "limit_exceeded"]);
  });

  test("the right password clears the count", async () => {
    await makeAccount(db, { email: EMAIL });
    for (let n = 0; n < 4; n += 1) await attempt("guess", { nowMs: TEST_NOW_MS });
    expect(await attempt(PASSWORD, { nowMs: TEST_NOW_MS })).toBe("in");
    for (let n = 0; n < 4; n += 1) await attempt("guess", { nowMs: TEST_NOW_MS });
    expect(await attempt(PASSWORD, { nowMs: TEST_NOW_MS })).toBe("in");
  });

  test("a clock set back does not prolong a wait", async () => {
    await makeAccount(db, { email: EMAIL });
    for (let n = 0; n < 5; n += 1) await attempt("guess", { nowMs: TEST_NOW_MS + HOUR_MS * 24 });
    expect(await attempt(PASSWORD, { nowMs: TEST_NOW_MS })).toBe("in");
  });
});

describe("wrong passwords from one address", () => {
  const from = { address: "192.0.2.1" };

  test("after 20 in 15 minutes over many accounts it waits, and others do not", async () => {
    await makeAccount(db, { email: EMAIL });
    for (let n = 0; n < 20; n += 1) {
      const email = `r${n}@riders.example`;
      expect(await attempt("guess", { ...from, nowMs: TEST_NOW_MS, email })).toBe("unauthenticated");
    }
    expect(await attempt(PASSWORD, { ...from, nowMs: TEST_NOW_MS })).toBe("limit_exceeded");
    expect(await attempt(PASSWORD, { nowMs: TEST_NOW_MS, address: "198.51.100.9" })).toBe("in");
    expect(await attempt(PASSWORD, { ...from, nowMs: TEST_NOW_MS + 15 * 60_000 })).toBe("in");
  });

  test("right passwords do not count: a whole club can sign in from one clubhouse", async () => {
    for (let n = 0; n < 25; n += 1) {
      const { email } = await makeAccount(db);
      expect(await attempt(PASSWORD, { ...from, nowMs: TEST_NOW_MS, email })).toBe("in");
    }
  });

  test("a try that had to wait for its account does not count against the address", async () => {
    for (let n = 0; n < 100; n += 1) await attempt("guess", { ...from, nowMs: TEST_NOW_MS });
    const other = { ...from, nowMs: TEST_NOW_MS, email: "other@riders.example" };
    expect(await attempt("guess", other)).toBe("unauthenticated");
  });
});

test("the table of counters holds neither e-mail nor network addresses", async () => {
  await attempt("guess", { nowMs: TEST_NOW_MS, address: "192.0.2.1" });
  const text = JSON.stringify(await db.read.select().from(throttle));
  expect(text).not.toContain(EMAIL);
  expect(text).not.toContain("192.0.2.1");
});

test("old counters are swept, fresh ones stay", async () => {
  await attempt("guess", { nowMs: TEST_NOW_MS });
  expect(await sweepThrottle(db, TEST_NOW_MS + HOUR_MS)).toBe(0);
  expect(await sweepThrottle(db, TEST_NOW_MS + 25 * HOUR_MS)).toBe(1);
});

test.each([
  [1, "1 second"],
  [999, "1 second"],
  [1001, "2 seconds"],
  [64_000, "64 seconds"],
  [100_000, "2 minutes"],
  [3_600_000, "60 minutes"],
])("a wait of %i ms is told as %s, never as less than it is", (waitMs, words) => {
  expect(waitWords(waitMs)).toBe(words);
});
