import { eq } from "drizzle-orm";
import { z } from "zod";
import { user } from "@/db/schema/user";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { fetchUser } from "./internal";

const schema = z.strictObject({
  speed: z.enum(["kn", "km/h", "mph", "m/s"], { error: "Choose a unit for speeds." }),
  distance: z.enum(["NM", "km", "mi"], { error: "Choose a unit for distances." }),
});

/** Changes the units in which one reads speeds and distances; what is stored stays in SI units. */
export async function updateUnits(ctx: Context, input: unknown): Promise<void> {
  const userId = requireUserId(ctx);
  const { speed, distance } = parseInput(schema, input);
  await ctx.db.write(async (tx) => {
    await fetchUser(tx, userId);
    await tx.update(user).set({ speedUnit: speed, distanceUnit: distance }).where(eq(user.id, userId));
    await audit(tx, ctx, { action: "update_units", subjectKind: "user", subjectId: userId });
  });
}
