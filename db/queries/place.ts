import { asc, eq } from "drizzle-orm";
import type { Reader, Transaction } from "@/db/client";
import { place } from "@/db/schema/place";

export type PlaceRow = typeof place.$inferSelect;

/** The places an owner has named, by name. */
export async function placesOf(db: Reader | Transaction, ownerId: string): Promise<PlaceRow[]> {
  return db.select().from(place).where(eq(place.ownerId, ownerId)).orderBy(asc(place.name));
}
