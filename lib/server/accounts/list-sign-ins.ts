import { IDLE_DAYS, lucia } from "@/lib/server/auth/lucia";
import { requireUserId, type Context } from "@/lib/server/context/context";

export type SignIn = {
  readonly id: string;
  readonly device: string;
  readonly createdAtMs: number;
  /** When it ends if it is not used before. */
  readonly endsAtMs: number;
  readonly isThisOne: boolean;
};

/** How long a sign-in lasts unused, for the sentence above the list. */
export const SIGN_IN_IDLE_DAYS = IDLE_DAYS;

/** One's own sign-ins that are still alive, this one first, then the newest. */
export async function listSignIns(ctx: Context): Promise<SignIn[]> {
  const userId = requireUserId(ctx);
  const own = ctx.actor.kind === "user" ? ctx.actor.authSessionId : "";
  const nowMs = ctx.nowMs();
  const rows = await lucia(ctx.db).getUserSessions(userId);
  return rows
    .map((row) => ({
      id: row.id,
      device: row.device,
      createdAtMs: row.createdAtMs,
      endsAtMs: Math.min(row.expiresAt.getTime(), row.absoluteEndMs),
      isThisOne: row.id === own,
    }))
    .filter((row) => row.endsAtMs > nowMs)
    .sort((a, b) => Number(b.isThisOne) - Number(a.isThisOne) || b.createdAtMs - a.createdAtMs);
}
