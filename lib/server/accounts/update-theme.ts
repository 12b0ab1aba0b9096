import { eq } from "drizzle-orm";
import { z } from "zod";
import { user } from "@/db/schema/user";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { fetchUser } from "./internal";

const schema = z.strictObject({
  theme: z.enum(["system", "light", "dark"], { error: "Choose how the pages look." }),
});

/** Changes whether one's pages are light, dark, or follow the device. */
export async function updateTheme(ctx: Context, input: unknown): Promise<void> {
  const userId = requireUserId(ctx);
  const { theme } = parseInput(schema, input);
  await ctx.db.write(async (tx) => {
    await fetchUser(tx, userId);
    await tx.update(user).set({ theme }).where(eq(user.id, userId));
    await audit(tx, ctx, { action: "update_theme", subjectKind: "user", subjectId: userId });
  });
}
