import { placesOf, type PlaceRow } from "@/db/queries/place";
import { requireUserId, type Context } from "@/lib/server/context/context";

/** The places the asker has named, by name. */
export async function listPlaces(ctx: Context): Promise<PlaceRow[]> {
  return placesOf(ctx.db.read, requireUserId(ctx));
}
