import { eq } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { auditLog } from "@/db/schema/audit-log";
import { emailToken } from "@/db/schema/email-token";
import { user } from "@/db/schema/user";
import { at } from "@/lib/errors/invariant";
import { confirmEmail, isConfirmLinkAlive } from "@/lib/server/accounts/confirm-email";
import { resendConfirmation } from "@/lib/server/accounts/resend-confirmation";
import { signUp } from "@/lib/server/accounts/sign-up";
import { letters, makeAccount, PASSWORD, tokenIn } from "@/tests/support/accounts";
import { openTestDatabase, testContext, TEST_NOW_MS } from "@/tests/support/test-database";

const HOUR_MS = 3_600_000;
const FORM = { email: "Aske@Riders.example ", password: PASSWORD, name: " Aske  Holm ", weight: "82,5 kg" };

let db: Database;
let close: () => Promise<void>;

beforeEach(async () => {
  vi.spyOn(process.stdout, "write").mockReturnValue(true);
  ({ db, close } = await openTestDatabase());
});
afterEach(() => close());

const accounts = () => db.read.select().from(user);

describe("signUp", () => {
  test("makes an account with a tidied address, an argon2id hash and one link in the mail", async () => {
    await signUp(testContext(db), FORM);
    const [made] = await accounts();
    expect(made).toMatchObject({
      email: "aske@riders.example",
      name: "Aske Holm",
      weightKg: 82.5,
      emailConfirmedAtMs: null,
    });
    // OWASP Password Storage Cheat Sheet: argon2id with at least 19 MiB (19456 KiB), 2 passes, 1 lane.
    expect(made?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    const sent = await letters(db);
    expect(sent).toHaveLength(1);
    expect(at(sent, 0)).toMatchObject({ recipient: "aske@riders.example", sentAtMs: null });
  });

  test("keeps no token in clear: the link's row holds its SHA-256", async () => {
    await signUp(testContext(db), FORM);
    const token = tokenIn(at(await letters(db), 0).body);
    const rows = await db.read.select().from(emailToken);
    expect(rows).toHaveLength(1);
    expect(JSON.stringify(rows)).not.toContain(token);
    expect(at(rows, 0).id).toMatch(/^[0-9a-f]{64}$/);
  });

  test("answers the same for an address that has an account, which is told by mail and left as it is", async () => {
    const owner = await makeAccount(db, { email: "aske@riders.example" });
    expect(await signUp(testContext(db), FORM)).toBeUndefined();
    expect(await accounts()).toEqual([owner]);
    const sent = await letters(db);
    expect(sent).toHaveLength(1);
    expect(at(sent, 0).subject).toBe("You already have an account on Trimwake");
    expect(at(sent, 0).body).not.toMatch(/token=/);
  });

  test("writes nothing of what was typed into the mail: nobody can write letters to strangers with it", async () => {
    await signUp(testContext(db), { ...FORM, name: "Win at evil.example" });
    expect(at(await letters(db), 0).body).not.toContain("evil.example");
  });

  test("refuses unknown fields, so that nobody confirms or promotes themselves", async () => {
    await expect(signUp(testContext(db), { ...FORM, emailConfirmedAtMs: 1 })).rejects.toMatchObject({
      code: "validation",
    });
    expect(await accounts()).toHaveLength(0);
  });

  test.each([
    ["email", { email: "aske at riders" }],
    ["password", { password: "short 7" }],
    ["password", { password: "x".repeat(129) }],
    ["password", { password: "trustno1" }],
    ["password", { password: "aske@riders.example" }],
    ["name", { name: "   " }],
    ["weight", { weight: "heavy" }],
    ["weight", { weight: "7" }],
  ])("says what is wrong beside the field %s for %o", async (field, change) => {
    const attempt = signUp(testContext(db), { ...FORM, ...change });
    await expect(attempt).rejects.toMatchObject({
      code: "validation",
      fields: { [field]: expect.stringMatching(/^[A-Z].*\.$/) },
    });
    expect(await accounts()).toHaveLength(0);
  });

  test("sends at most five messages an hour to one mailbox", async () => {
    for (let n = 0; n < 5; n += 1) await signUp(testContext(db), FORM);
    await expect(signUp(testContext(db), FORM)).rejects.toMatchObject({ code: "limit_exceeded" });
    expect(await letters(db)).toHaveLength(5);
    await signUp(testContext(db, { nowMs: TEST_NOW_MS + HOUR_MS }), FORM);
    expect(await letters(db)).toHaveLength(6);
  });
});

describe("confirmEmail", () => {
  const link = async () => {
    await signUp(testContext(db), FORM);
    return tokenIn(at(await letters(db), 0).body);
  };

  test("confirms by the link, once", async () => {
    const token = await link();
    expect(await isConfirmLinkAlive(testContext(db), token)).toBe(true);
    await confirmEmail(testContext(db), { token });
    expect(at(await accounts(), 0).emailConfirmedAtMs).toBe(TEST_NOW_MS);
    expect(await isConfirmLinkAlive(testContext(db), token)).toBe(false);
    await expect(confirmEmail(testContext(db), { token })).rejects.toMatchObject({ code: "precondition" });
    const trail = await db.read.select().from(auditLog).where(eq(auditLog.action, "confirm_email"));
    expect(trail).toHaveLength(1);
  });

  test("refuses the link after 24 hours", async () => {
    const token = await link();
    const late = testContext(db, { nowMs: TEST_NOW_MS + 24 * HOUR_MS });
    await expect(confirmEmail(late, { token })).rejects.toMatchObject({ code: "precondition" });
    const inTime = testContext(db, { nowMs: TEST_NOW_MS + 24 * HOUR_MS - 1 });
    await confirmEmail(inTime, { token });
  });

  test("refuses a link whose end lies further ahead than links live: the clock was set back", async () => {
    const token = await link();
    const before = testContext(db, { nowMs: TEST_NOW_MS - 24 * HOUR_MS });
    await expect(confirmEmail(before, { token })).rejects.toMatchObject({ code: "precondition" });
  });

  test.each([[undefined], [""], ["x".repeat(43)], [{}], ["'; DROP TABLE user"]])(
    "answers a made-up link %o in words",
    async (token) => {
      await link();
      await expect(confirmEmail(testContext(db), { token })).rejects.toMatchObject({ code: "precondition" });
      expect(at(await accounts(), 0).emailConfirmedAtMs).toBeNull();
    },
  );
});

describe("resendConfirmation", () => {
  test("sends a new link and makes the old one useless", async () => {
    await signUp(testContext(db), FORM);
    await resendConfirmation(testContext(db, { nowMs: TEST_NOW_MS + 1 }), { email: FORM.email });
    const [first, second] = (await letters(db)).map((letter) => tokenIn(letter.body));
    await expect(confirmEmail(testContext(db), { token: first })).rejects.toMatchObject({
      code: "precondition",
    });
    await confirmEmail(testContext(db), { token: second });
  });

  test("sends nothing to strangers and to confirmed accounts, and says so to nobody", async () => {
    const { email } = await makeAccount(db);
    expect(await resendConfirmation(testContext(db), { email })).toBeUndefined();
    expect(await resendConfirmation(testContext(db), { email: "nobody@riders.example" })).toBeUndefined();
    expect(await letters(db)).toHaveLength(0);
  });

  test("asks for an address that is one", async () => {
    await expect(resendConfirmation(testContext(db), { email: "x" })).rejects.toMatchObject({
      fields: { email: expect.any(String) },
    });
  });
});
