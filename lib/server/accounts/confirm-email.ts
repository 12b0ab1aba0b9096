import { eq } from "drizzle-orm";
import { z } from "zod";
import { user } from "@/db/schema/user";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";
import { addressChangedMessage } from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import {
  consumeEmailToken,
  deadLink,
  dropEmailTokens,
  fetchUser,
  findByEmail,
  findEmailToken,
} from "./internal";
import { tokenField } from "./schemas";

const schema = z.strictObject({ token: tokenField });

/**
 * Confirms the address a link was sent to; for a changed address this is when it becomes the account's. It signs
 * nobody in: the account may have been made by a stranger with somebody else's address.
 *
 * @throws AppError `precondition` for a link that was used, is too old or never existed.
 */
export async function confirmEmail(ctx: Context, input: unknown): Promise<{ userId: string }> {
  const parsed = schema.safeParse(input);
  if (!parsed.success) throw deadLink("confirm_email");
  const nowMs = ctx.nowMs();
  return ctx.db.write(async (tx) => {
    const link = await consumeEmailToken(tx, { token: parsed.data.token, purpose: "confirm_email", nowMs });
    const before = await fetchUser(tx, link.userId);
    if (link.email !== before.email) {
      // Somebody else may have taken the address since the link was sent.
      if ((await findByEmail(tx, link.email)) !== null) throw deadLink("confirm_email");
      await dropEmailTokens(tx, before.id, "reset_password");
      await queueMail(tx, { to: before.email, message: addressChangedMessage(), nowMs });
    }
    await tx.update(user).set({ email: link.email, emailConfirmedAtMs: nowMs }).where(eq(user.id, before.id));
    await audit(tx, ctx, {
      action: link.email === before.email ? "confirm_email" : "change_email",
      subjectKind: "user",
      subjectId: before.id,
    });
    logEvent("info", "email_confirmed", { userId: before.id, requestId: ctx.requestId });
    return { userId: before.id };
  });
}

/** Whether a confirmation link would work now; looking does not use it up. */
export async function isConfirmLinkAlive(ctx: Context, token: unknown): Promise<boolean> {
  const parsed = tokenField.safeParse(token);
  if (!parsed.success) return false;
  const link = { token: parsed.data, purpose: "confirm_email" as const, nowMs: ctx.nowMs() };
  return (await findEmailToken(ctx.db.read, link)) !== null;
}
