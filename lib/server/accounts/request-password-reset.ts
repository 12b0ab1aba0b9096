import { z } from "zod";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { resetMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { RESET_PER_RECIPIENT } from "@/lib/server/throttle/throttle";
import { parseInput } from "@/lib/server/input/parse-input";
import { findByEmail, issueEmailToken, logId, takeMailTurn } from "./internal";
import { emailField } from "./schemas";

const schema = z.strictObject({ email: emailField });

/** Sends a link to set a new password, when the address has an account. Whether it does is not told. */
export async function requestPasswordReset(ctx: Context, input: unknown): Promise<void> {
  const { email } = parseInput(schema, input);
  const nowMs = ctx.nowMs();
  await ctx.db.write(async (tx) => {
    await takeMailTurn(tx, ctx, email, RESET_PER_RECIPIENT);
    const row = await findByEmail(tx, email);
    if (row === null) return;
    const token = await issueEmailToken(tx, { userId: row.id, purpose: "reset_password", email, nowMs });
    await audit(tx, ctx, { action: "request_password_reset", subjectKind: "user", subjectId: row.id });
    await queueMail(tx, { to: email, message: resetMessage(env().origin, token), nowMs });
  });
  logEvent("info", "reset_asked", { account: logId(email), requestId: ctx.requestId });
}
