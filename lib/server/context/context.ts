import type { Database } from "@/db/client";
import { AppError } from "@/lib/errors/app-error";

/** Who asks. The system actor is a command or a start-up task, never a request. */
export type Actor =
  | { readonly kind: "user"; readonly userId: string; readonly authSessionId: string }
  | { readonly kind: "anonymous" }
  | { readonly kind: "system" };

/** What every verb gets first: the database, who asks, the clock, and where the request came from. */
export type Context = {
  readonly db: Database;
  readonly actor: Actor;
  readonly nowMs: () => number;
  readonly requestId: string;
  /** Address of the client as seen past the trusted proxies, or null. */
  readonly address: string | null;
};

/**
 * The id of the signed-in user, the first line of every verb that needs one.
 *
 * @throws AppError `unauthenticated` for anybody else.
 */
export function requireUserId(ctx: Context): string {
  if (ctx.actor.kind !== "user") throw new AppError("unauthenticated", "Sign in to go on.");
  return ctx.actor.userId;
}
