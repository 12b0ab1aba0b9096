import { sessionOf, type SessionRow } from "@/db/queries/session";
import { AppError } from "@/lib/errors/app-error";

export const NOT_IN_LOG = "This session is not in your log.";

/** A session of the owner that is not deleted. @throws AppError `not_found`. */
export async function requireSession(
  db: Parameters<typeof sessionOf>[0],
  ownerId: string,
  sessionId: string,
): Promise<SessionRow> {
  const row = await sessionOf(db, ownerId, sessionId);
  if (row === undefined || row.deletedAtMs !== null) throw new AppError("not_found", NOT_IN_LOG);
  return row;
}

/** For a result that was worked out from a state of the session that is no longer its state. */
export function changedMeanwhile(): AppError {
  return new AppError(
    "conflict",
    "The session was changed in another window meanwhile. Load the page again.",
  );
}
