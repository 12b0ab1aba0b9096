import { eq } from "drizzle-orm";
import { z } from "zod";
import { authSession } from "@/db/schema/auth-session";
import { user } from "@/db/schema/user";
import { AppError } from "@/lib/errors/app-error";
import { hashPassword } from "@/lib/server/auth/password";
import { passwordProblem } from "@/lib/server/auth/password-rules";
import { endSignIns, startSignIn } from "@/lib/server/auth/sign-ins";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { passwordChangedMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { parseInput } from "@/lib/server/input/parse-input";
import { dropEmailTokens, fetchUser, reauthenticate } from "./internal";
import { newPasswordField, passwordField } from "./schemas";

const schema = z.strictObject({
  currentPassword: passwordField,
  newPassword: newPasswordField,
  endOthers: z.boolean(),
});

/**
 * Changes the password of the person who is signed in and knows the old one. This sign-in gets a new token and
 * its old one dies; the others end too when asked for. Links to reset the password stop working.
 */
export async function changePassword(
  ctx: Context,
  input: unknown,
  device: string,
): Promise<{ token: string; ended: number }> {
  const userId = requireUserId(ctx);
  const { currentPassword, newPassword, endOthers } = parseInput(schema, input);
  const row = await fetchUser(ctx.db.read, userId);
  const problem = passwordProblem(newPassword, row);
  if (problem !== null) throw new AppError("validation", problem, { fields: { newPassword: problem } });
  await reauthenticate(ctx, row, { password: currentPassword, field: "currentPassword" });
  const passwordHash = await hashPassword(newPassword);
  const nowMs = ctx.nowMs();
  const result = await ctx.db.write(async (tx) => {
    await tx.update(user).set({ passwordHash }).where(eq(user.id, userId));
    await dropEmailTokens(tx, userId, "reset_password");
    const oldId = ctx.actor.kind === "user" ? ctx.actor.authSessionId : "";
    await tx.delete(authSession).where(eq(authSession.id, oldId));
    const ended = endOthers ? await endSignIns(tx, userId, null) : 0;
    await audit(tx, ctx, {
      action: "change_password",
      subjectKind: "user",
      subjectId: userId,
      detail: { ended },
    });
    await queueMail(tx, { to: row.email, message: passwordChangedMessage(env().origin), nowMs });
    return { token: await startSignIn(tx, { userId, device, nowMs }), ended };
  });
  logEvent("info", "password_changed", { userId, ended: result.ended, requestId: ctx.requestId });
  return result;
}
