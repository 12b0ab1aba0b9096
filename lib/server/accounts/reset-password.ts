import { eq } from "drizzle-orm";
import { z } from "zod";
import { user } from "@/db/schema/user";
import { AppError } from "@/lib/errors/app-error";
import { hashPassword } from "@/lib/server/auth/password";
import { passwordProblem } from "@/lib/server/auth/password-rules";
import { endSignIns, startSignIn } from "@/lib/server/auth/sign-ins";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { passwordChangedMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { forgetTurns, SIGN_IN_PER_ACCOUNT } from "@/lib/server/throttle/throttle";
import { parseInput } from "@/lib/server/input/parse-input";
import { consumeEmailToken, deadLink, fetchUser, findEmailToken } from "./internal";
import { newPasswordField, tokenField } from "./schemas";

const PURPOSE = "reset_password";
const schema = z.strictObject({ token: z.unknown(), password: newPasswordField });

/**
 * Sets a new password by the link from the mailbox and signs in with it; every other sign-in of the account ends.
 * A refused password does not use the link up. Signing in here is the owner's way past somebody who keeps the
 * account busy with wrong passwords.
 *
 * @throws AppError `precondition` for a dead link, `validation` for a password that cannot be taken.
 */
export async function resetPassword(
  ctx: Context,
  input: unknown,
  device: string,
): Promise<{ userId: string; token: string }> {
  const { password, ...rest } = parseInput(schema, input);
  const parsed = tokenField.safeParse(rest.token);
  if (!parsed.success) throw deadLink(PURPOSE);
  const link = { token: parsed.data, purpose: PURPOSE, nowMs: ctx.nowMs() } as const;
  const found = await findEmailToken(ctx.db.read, link);
  if (found === null) throw deadLink(PURPOSE);
  const row = await fetchUser(ctx.db.read, found.userId);
  const problem = passwordProblem(password, row);
  if (problem !== null) throw new AppError("validation", problem, { fields: { password: problem } });
  const passwordHash = await hashPassword(password);
  const token = await ctx.db.write(async (tx) => {
    const used = await consumeEmailToken(tx, link);
    // The link came out of the mailbox, which confirms the address as well.
    const emailConfirmedAtMs =
      used.email === row.email ? (row.emailConfirmedAtMs ?? link.nowMs) : row.emailConfirmedAtMs;
    await tx.update(user).set({ passwordHash, emailConfirmedAtMs }).where(eq(user.id, row.id));
    await endSignIns(tx, row.id, null);
    await forgetTurns(tx, SIGN_IN_PER_ACCOUNT, row.email);
    await audit(tx, ctx, { action: "reset_password", subjectKind: "user", subjectId: row.id });
    await queueMail(tx, { to: row.email, message: passwordChangedMessage(env().origin), nowMs: link.nowMs });
    return startSignIn(tx, { userId: row.id, device, nowMs: link.nowMs });
  });
  logEvent("info", "password_reset", { userId: row.id, requestId: ctx.requestId });
  return { userId: row.id, token };
}

/** Whether a reset link would work now; looking does not use it up. */
export async function isResetLinkAlive(ctx: Context, token: unknown): Promise<boolean> {
  const parsed = tokenField.safeParse(token);
  if (!parsed.success) return false;
  return (
    (await findEmailToken(ctx.db.read, { token: parsed.data, purpose: PURPOSE, nowMs: ctx.nowMs() })) !== null
  );
}
