import { z } from "zod";
import { newId } from "@/db/new-id";
import { user } from "@/db/schema/user";
import { AppError } from "@/lib/errors/app-error";
import { hashPassword } from "@/lib/server/auth/password";
import { passwordProblem } from "@/lib/server/auth/password-rules";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { alreadyHereMessage, confirmMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { parseInput } from "@/lib/server/input/parse-input";
import { findByEmail, issueEmailToken, logId, takeMailTurn } from "./internal";
import { emailField, nameField, newPasswordField, weightField } from "./schemas";

const schema = z.strictObject({
  email: emailField,
  password: newPasswordField,
  name: nameField,
  weight: weightField,
});

/**
 * Makes an account and sends the link that confirms its address. An address that has an account already gets a
 * message that says so instead, and the person at the screen is told the same either way: nobody can find out
 * here who has an account. Both ways hash a password and write one transaction, so they take the same time.
 */
export async function signUp(ctx: Context, input: unknown): Promise<void> {
  const { email, password, name, weight } = parseInput(schema, input);
  const problem = passwordProblem(password, { email, name });
  if (problem !== null) throw new AppError("validation", problem, { fields: { password: problem } });
  const passwordHash = await hashPassword(password);
  const nowMs = ctx.nowMs();
  await ctx.db.write(async (tx) => {
    await takeMailTurn(tx, ctx, email);
    const existing = await findByEmail(tx, email);
    if (existing !== null) {
      await audit(tx, ctx, { action: "sign_up_again", subjectKind: "user", subjectId: existing.id });
      await queueMail(tx, { to: email, message: alreadyHereMessage(env().origin), nowMs });
      return;
    }
    const id = newId();
    await tx.insert(user).values({ id, email, passwordHash, name, weightKg: weight, createdAtMs: nowMs });
    const token = await issueEmailToken(tx, { userId: id, purpose: "confirm_email", email, nowMs });
    await audit(tx, ctx, { action: "sign_up", subjectKind: "user", subjectId: id });
    await queueMail(tx, { to: email, message: confirmMessage(env().origin, token), nowMs });
  });
  logEvent("info", "sign_up", { account: logId(email), requestId: ctx.requestId });
}
