import { endSignIns } from "@/lib/server/auth/sign-ins";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";

/** Ends all of one's own sign-ins but the one that asks. Gives back how many ended. */
export async function endOtherSignIns(ctx: Context): Promise<number> {
  const userId = requireUserId(ctx);
  const own = ctx.actor.kind === "user" ? ctx.actor.authSessionId : null;
  return ctx.db.write(async (tx) => {
    const ended = await endSignIns(tx, userId, own);
    await audit(tx, ctx, {
      action: "end_other_sign_ins",
      subjectKind: "user",
      subjectId: userId,
      detail: { ended },
    });
    return ended;
  });
}
