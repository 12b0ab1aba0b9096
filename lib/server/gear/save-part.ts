import { and, eq } from "drizzle-orm";
import { newId } from "@/db/new-id";
import { partOf, partsOf, type PartRow } from "@/db/queries/gear";
import { part } from "@/db/schema/part";
import { AppError } from "@/lib/errors/app-error";
import { partSchema } from "@/lib/gear/part-schema";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";

/** More than anybody owns, retired ones and all; every page that offers parts reads them whole. */
export const PARTS_MAX = 1000;

/**
 * Adds a part to the asker's quiver. One transaction with its audit row.
 *
 * @throws AppError `validation`; `limit_exceeded` past 1000 parts.
 */
export async function createPart(ctx: Context, input: unknown): Promise<PartRow> {
  const ownerId = requireUserId(ctx);
  const value = parseInput(partSchema, input);
  return ctx.db.write(async (tx) => {
    if ((await partsOf(tx, ownerId)).length >= PARTS_MAX) {
      throw new AppError("limit_exceeded", `Your quiver holds ${PARTS_MAX} parts, the most there can be.`);
    }
    const row = { id: newId(), ownerId, ...value, retiredAtMs: null, createdAtMs: ctx.nowMs() };
    await tx.insert(part).values(row);
    await audit(tx, ctx, { action: "part.create", subjectKind: "part", subjectId: row.id });
    return row;
  });
}

/**
 * Changes a part of the asker. The kind stays: history hangs on it.
 *
 * @throws AppError `not_found` for a part that is not the asker's; `precondition` for a change of kind.
 */
export async function updatePart(ctx: Context, partId: string, input: unknown): Promise<void> {
  const ownerId = requireUserId(ctx);
  const value = parseInput(partSchema, input);
  await ctx.db.write(async (tx) => {
    const found = await partOf(tx, ownerId, partId);
    if (found === undefined) throw new AppError("not_found", "This part is not in your quiver.");
    if (found.kind !== value.kind) {
      throw new AppError("precondition", "A part keeps its kind. Add a new part instead.");
    }
    await tx
      .update(part)
      .set({ maker: value.maker, model: value.model, notes: value.notes, dimensions: value.dimensions })
      .where(and(eq(part.id, partId), eq(part.ownerId, ownerId)));
    await audit(tx, ctx, { action: "part.update", subjectKind: "part", subjectId: partId });
  });
}

/**
 * Takes a part out of use, or back into it, without touching the sessions it was ridden in.
 *
 * @throws AppError `not_found` for a part that is not the asker's.
 */
export async function retirePart(ctx: Context, partId: string, retired: boolean): Promise<void> {
  const ownerId = requireUserId(ctx);
  await ctx.db.write(async (tx) => {
    if ((await partOf(tx, ownerId, partId)) === undefined) {
      throw new AppError("not_found", "This part is not in your quiver.");
    }
    await tx
      .update(part)
      .set({ retiredAtMs: retired ? ctx.nowMs() : null })
      .where(and(eq(part.id, partId), eq(part.ownerId, ownerId)));
    await audit(tx, ctx, {
      action: retired ? "part.retire" : "part.unretire",
      subjectKind: "part",
      subjectId: partId,
    });
  });
}
