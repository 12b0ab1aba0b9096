import { z } from "zod";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { confirmMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { parseInput } from "@/lib/server/input/parse-input";
import { findByEmail, issueEmailToken, logId, takeMailTurn } from "./internal";
import { emailField } from "./schemas";

const schema = z.strictObject({ email: emailField });

/**
 * Sends the confirmation link once more, when the address has an account that waits for it. Whether it does is
 * not told.
 */
export async function resendConfirmation(ctx: Context, input: unknown): Promise<void> {
  const { email } = parseInput(schema, input);
  const nowMs = ctx.nowMs();
  await ctx.db.write(async (tx) => {
    await takeMailTurn(tx, ctx, email);
    const row = await findByEmail(tx, email);
    if (row === null || row.emailConfirmedAtMs !== null) return;
    const token = await issueEmailToken(tx, { userId: row.id, purpose: "confirm_email", email, nowMs });
    await audit(tx, ctx, { action: "resend_confirmation", subjectKind: "user", subjectId: row.id });
    await queueMail(tx, { to: email, message: confirmMessage(env().origin, token), nowMs });
  });
  logEvent("info", "confirmation_asked", { account: logId(email), requestId: ctx.requestId });
}
