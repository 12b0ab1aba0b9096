import { eq } from "drizzle-orm";
import { redirect } from "next/navigation";
import { cache } from "react";
import { user } from "@/db/schema/user";
import type { DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";
import { database } from "@/lib/server/context/database";
import { readActor } from "./read-actor";

/** What pages may know of the person at the screen. */
export type CurrentUser = {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly emailConfirmed: boolean;
  readonly weightKg: number | null;
  readonly units: { readonly speed: SpeedUnit; readonly distance: DistanceUnit };
  readonly theme: "system" | "light" | "dark";
};

/** The signed-in person, or null. */
export const currentUser = cache(async (): Promise<CurrentUser | null> => {
  const actor = await readActor();
  if (actor.kind !== "user") return null;
  const row = (await database().read.select().from(user).where(eq(user.id, actor.userId)).limit(1))[0];
  if (row === undefined) return null;
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    emailConfirmed: row.emailConfirmedAtMs !== null,
    weightKg: row.weightKg,
    units: { speed: row.speedUnit, distance: row.distanceUnit },
    theme: row.theme,
  };
});

/** The signed-in person; sends anybody else to the sign-in page, which leads back to `from` (a path). */
export async function requireUser(from: string): Promise<CurrentUser> {
  const found = await currentUser();
  if (found === null) redirect(`/sign-in?next=${encodeURIComponent(from)}`);
  return found;
}
