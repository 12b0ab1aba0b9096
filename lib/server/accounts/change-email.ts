import { z } from "zod";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { env } from "@/lib/server/env/env";
import { alreadyHereMessage, confirmMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { AppError } from "@/lib/errors/app-error";
import { parseInput } from "@/lib/server/input/parse-input";
import { fetchUser, findByEmail, issueEmailToken, reauthenticate, takeMailTurn } from "./internal";
import { emailField, passwordField } from "./schemas";

const schema = z.strictObject({ email: emailField, currentPassword: passwordField });

/**
 * Asks for another e-mail address: it becomes the account's when the link sent there is used. An address that has
 * an account already is told by mail, not on the screen.
 */
export async function changeEmail(ctx: Context, input: unknown): Promise<void> {
  const userId = requireUserId(ctx);
  const { email, currentPassword } = parseInput(schema, input);
  const row = await fetchUser(ctx.db.read, userId);
  if (email === row.email) {
    const text = "This is your address already.";
    throw new AppError("validation", text, { fields: { email: text } });
  }
  await reauthenticate(ctx, row, { password: currentPassword, field: "currentPassword" });
  const nowMs = ctx.nowMs();
  await ctx.db.write(async (tx) => {
    await takeMailTurn(tx, ctx, email);
    await audit(tx, ctx, { action: "ask_change_email", subjectKind: "user", subjectId: userId });
    if ((await findByEmail(tx, email)) !== null) {
      await queueMail(tx, { to: email, message: alreadyHereMessage(env().origin), nowMs });
      return;
    }
    const token = await issueEmailToken(tx, { userId, purpose: "confirm_email", email, nowMs });
    await queueMail(tx, { to: email, message: confirmMessage(env().origin, token), nowMs });
  });
}
