import { eq } from "drizzle-orm";
import { authSession } from "@/db/schema/auth-session";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { logEvent } from "@/lib/server/context/log";

/** Ends the sign-in of this request on the server; the cookie is worthless from then on. Anonymous is fine. */
export async function signOut(ctx: Context): Promise<void> {
  const { actor } = ctx;
  if (actor.kind !== "user") return;
  await ctx.db.write(async (tx) => {
    await tx.delete(authSession).where(eq(authSession.id, actor.authSessionId));
    await audit(tx, ctx, { action: "sign_out", subjectKind: "user", subjectId: actor.userId });
  });
  logEvent("info", "sign_out", { userId: actor.userId, requestId: ctx.requestId });
}
