import { and, eq } from "drizzle-orm";
import { z } from "zod";
import type { Transaction } from "@/db/client";
import { newId } from "@/db/new-id";
import { placesOf, type PlaceRow } from "@/db/queries/place";
import { sessionsTitledByPlace } from "@/db/queries/session";
import { place } from "@/db/schema/place";
import { session } from "@/db/schema/session";
import { AppError } from "@/lib/errors/app-error";
import { distanceM } from "@/lib/geo/distance-m";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { requireSession } from "@/lib/server/sessions/require-session";
import { endsOf, sessionTitle } from "@/lib/server/sessions/session-title";

/** Naming this near to a named place gives it the new name instead of adding a second one, m. */
const SAME_PLACE_M = 400;
const PLACES_MAX = 500;

export const placeSchema = z.strictObject({
  sessionId: z.string().min(1).max(40),
  end: z.enum(["start", "end"]),
  name: z.string().trim().min(1, "Enter a name for the place.").max(60, "Use at most 60 characters."),
});

/**
 * Names the place where a session of the asker began or ended. Titles that are not the rider's own wording follow, in all
 * their sessions.
 *
 * @throws AppError `unauthenticated`, `not_found`, `validation`; `limit_exceeded` past 500 places.
 */
export async function recordPlace(ctx: Context, input: unknown): Promise<PlaceRow> {
  const ownerId = requireUserId(ctx);
  const { sessionId, end, name } = parseInput(placeSchema, input);
  return ctx.db.write(async (tx) => {
    const ends = endsOf(await requireSession(tx, ownerId, sessionId));
    if (ends === null)
      throw new AppError("precondition", "It is not known where this session began and ended.");
    const at = end === "start" ? ends.from : ends.to;
    const places = await placesOf(tx, ownerId);
    const near = places.find(
      (one) => distanceM(one.latDeg, one.lonDeg, at.latDeg, at.lonDeg) <= SAME_PLACE_M,
    );
    if (near === undefined && places.length >= PLACES_MAX) {
      throw new AppError("limit_exceeded", `You have named ${PLACES_MAX} places, the most there can be.`);
    }
    const row = near ?? { id: newId(), ownerId, name, ...at, createdAtMs: ctx.nowMs() };
    if (near === undefined) await tx.insert(place).values(row);
    else
      await tx
        .update(place)
        .set({ name })
        .where(and(eq(place.id, near.id), eq(place.ownerId, ownerId)));
    await retitle(tx, ownerId);
    await audit(tx, ctx, { action: "place.record", subjectKind: "place", subjectId: row.id });
    return { ...row, name };
  });
}

async function retitle(tx: Transaction, ownerId: string): Promise<void> {
  const places = await placesOf(tx, ownerId);
  for (const row of await sessionsTitledByPlace(tx, ownerId)) {
    const ends = endsOf(row);
    if (ends === null) continue;
    const title = sessionTitle(row.discipline, ends, places);
    if (title !== row.title) await tx.update(session).set({ title }).where(eq(session.id, row.id));
  }
}
