import { and, eq } from "drizzle-orm";
import { z } from "zod";
import { authSession } from "@/db/schema/auth-session";
import { AppError } from "@/lib/errors/app-error";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";

const schema = z.strictObject({ id: z.string().regex(/^[0-9a-f]{64}$/) });

/**
 * Ends one of one's own sign-ins.
 *
 * @throws AppError `not_found` for one that has ended or is somebody else's.
 */
export async function endSignIn(ctx: Context, input: unknown): Promise<void> {
  const userId = requireUserId(ctx);
  const { id } = parseInput(schema, input);
  await ctx.db.write(async (tx) => {
    const ended = await tx
      .delete(authSession)
      .where(and(eq(authSession.id, id), eq(authSession.userId, userId)))
      .returning({ device: authSession.device });
    if (ended.length === 0) throw new AppError("not_found", "This sign-in has ended already.");
    await audit(tx, ctx, { action: "end_sign_in", subjectKind: "user", subjectId: userId });
  });
}
