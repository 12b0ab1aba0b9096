import { and, eq } from "drizzle-orm";
import { z } from "zod";
import { authSession } from "@/db/schema/auth-session";
import { user } from "@/db/schema/user";
import { AppError } from "@/lib/errors/app-error";
import { hashPassword, isWeakHash, verifyPassword } from "@/lib/server/auth/password";
import { startSignIn } from "@/lib/server/auth/sign-ins";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import {
  forgetTurns,
  giveTurnBack,
  SIGN_IN_PER_ACCOUNT,
  SIGN_IN_PER_ADDRESS,
  takeTurn,
  tooSoon,
} from "@/lib/server/throttle/throttle";
import { parseInput } from "@/lib/server/input/parse-input";
import { findByEmail, logId } from "./internal";
import { emailField, passwordField } from "./schemas";

const schema = z.strictObject({ email: emailField, password: passwordField });

/** Counts the try before the password is looked at. */
async function takeSignInTurn(ctx: Context, email: string): Promise<void> {
  await ctx.db.write(async (tx) => {
    const nowMs = ctx.nowMs();
    const accountMs = await takeTurn(tx, SIGN_IN_PER_ACCOUNT, email, nowMs);
    const addressMs = await takeTurn(tx, SIGN_IN_PER_ADDRESS, ctx.address, nowMs);
    const waitMs = Math.max(accountMs, addressMs);
    if (waitMs === 0) return;
    logEvent("warn", "sign_in_throttled", { account: logId(email), waitMs, requestId: ctx.requestId });
    // Throwing undoes both counts: a try that was not looked at costs nobody anything.
    throw tooSoon("Too many wrong passwords in a row.", waitMs);
  });
}

/**
 * Signs somebody in and gives back the token for the cookie. An account whose address is not confirmed yet may
 * sign in: a lost message must not keep a rider from a track. `device` is how the list of sign-ins names it.
 *
 * @throws AppError `unauthenticated`, the same for a wrong password and an unknown address; `limit_exceeded`
 * after too many wrong ones.
 */
export async function signIn(
  ctx: Context,
  input: unknown,
  device: string,
): Promise<{ userId: string; token: string }> {
  const { email, password } = parseInput(schema, input);
  await takeSignInTurn(ctx, email);
  const row = await findByEmail(ctx.db.read, email);
  const isRight = await verifyPassword(row?.passwordHash ?? null, password);
  if (row === null || !isRight) {
    logEvent("warn", "sign_in_refused", { account: logId(email), requestId: ctx.requestId });
    throw new AppError("unauthenticated", "The e-mail address or the password is not right.");
  }
  const betterHash = isWeakHash(row.passwordHash) ? await hashPassword(password) : null;
  const token = await ctx.db.write(async (tx) => {
    await forgetTurns(tx, SIGN_IN_PER_ACCOUNT, email);
    await giveTurnBack(tx, SIGN_IN_PER_ADDRESS, ctx.address);
    if (betterHash !== null) {
      // Only if it is still the hash that was checked: a password changed meanwhile stays changed.
      await tx
        .update(user)
        .set({ passwordHash: betterHash })
        .where(and(eq(user.id, row.id), eq(user.passwordHash, row.passwordHash)));
    }
    if (ctx.actor.kind === "user") {
      await tx.delete(authSession).where(eq(authSession.id, ctx.actor.authSessionId));
    }
    await audit(tx, ctx, { action: "sign_in", subjectKind: "user", subjectId: row.id });
    return startSignIn(tx, { userId: row.id, device, nowMs: ctx.nowMs() });
  });
  logEvent("info", "sign_in", { account: logId(email), userId: row.id, requestId: ctx.requestId });
  return { userId: row.id, token };
}
