import { sessionWithFigures, type SessionRow } from "@/db/queries/session";
import type { Figures } from "@/lib/analysis/analysis";
import { AppError } from "@/lib/errors/app-error";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { NOT_IN_LOG } from "./require-session";

export type SessionDetail = SessionRow & {
  readonly figures: Figures;
  /** The uploaded file as its owner named it, and its size. */
  readonly fileName: string;
  readonly sizeBytes: number;
};

/**
 * One session of the asker with its figures as a whole; a deleted one too while it can be brought back (`deletedAtMs` says so).
 *
 * @throws AppError `unauthenticated`, `not_found`.
 */
export async function getSession(ctx: Context, sessionId: string): Promise<SessionDetail> {
  const found = await sessionWithFigures(ctx.db.read, requireUserId(ctx), sessionId);
  if (found === undefined) throw new AppError("not_found", NOT_IN_LOG);
  const { session, figures, fileName, sizeBytes } = found;
  return { ...session, figures, fileName, sizeBytes };
}
