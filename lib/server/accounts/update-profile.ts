import { eq } from "drizzle-orm";
import { z } from "zod";
import { user } from "@/db/schema/user";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { fetchUser } from "./internal";
import { nameField, weightField } from "./schemas";

const schema = z.strictObject({ name: nameField, weight: weightField });

/** Changes one's own name and weight with gear (kilograms; empty forgets it). */
export async function updateProfile(ctx: Context, input: unknown): Promise<void> {
  const userId = requireUserId(ctx);
  const { name, weight } = parseInput(schema, input);
  await ctx.db.write(async (tx) => {
    await fetchUser(tx, userId);
    await tx.update(user).set({ name, weightKg: weight }).where(eq(user.id, userId));
    await audit(tx, ctx, { action: "update_profile", subjectKind: "user", subjectId: userId });
  });
}
