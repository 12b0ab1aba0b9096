import { and, eq } from "drizzle-orm";
import type { Transaction } from "@/db/client";
import { newId } from "@/db/new-id";
import { partsOf, setupOf, setupsOf, type SetupRow } from "@/db/queries/gear";
import { setup } from "@/db/schema/setup";
import { AppError } from "@/lib/errors/app-error";
import { setupSchema, SETUP_PART_COLUMNS, type SetupInput } from "@/lib/gear/part-schema";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";

/** More than anybody rides, retired ones and all; every page that offers setups reads them whole. */
export const SETUPS_MAX = 1000;

const NOT_YOURS = "This setup is not in your quiver.";

/** Every part must be the owner's and of the kind its place asks for. */
async function requireOwnParts(tx: Transaction, ownerId: string, value: SetupInput): Promise<void> {
  const kinds = new Map((await partsOf(tx, ownerId)).map((row) => [row.id, row.kind]));
  const fields: Record<string, string> = {};
  for (const [column, kind] of SETUP_PART_COLUMNS) {
    const id = value[column];
    if (id !== null && kinds.get(id) !== kind) fields[column] = "Choose a part from your quiver.";
  }
  if (Object.keys(fields).length > 0) {
    throw new AppError("validation", "There is a problem with what was entered.", { fields });
  }
}

/**
 * Adds a setup to the asker's quiver; `copiedFromId` remembers what it was made from.
 *
 * @throws AppError `validation` for a part that is not the asker's or of the wrong kind;
 *   `not_found` when the setup it is copied from is not the asker's; `limit_exceeded` past 1000 setups.
 */
export async function createSetup(
  ctx: Context,
  input: unknown,
  copiedFromId: string | null = null,
): Promise<SetupRow> {
  const ownerId = requireUserId(ctx);
  const value = parseInput(setupSchema, input);
  return ctx.db.write(async (tx) => {
    await requireOwnParts(tx, ownerId, value);
    if (copiedFromId !== null && (await setupOf(tx, ownerId, copiedFromId)) === undefined) {
      throw new AppError("not_found", NOT_YOURS);
    }
    if ((await setupsOf(tx, ownerId)).length >= SETUPS_MAX) {
      throw new AppError("limit_exceeded", `Your quiver holds ${SETUPS_MAX} setups, the most there can be.`);
    }
    const row = { id: newId(), ownerId, ...value, copiedFromId, retiredAtMs: null, createdAtMs: ctx.nowMs() };
    await tx.insert(setup).values(row);
    await audit(tx, ctx, { action: "setup.create", subjectKind: "setup", subjectId: row.id });
    return row;
  });
}

/**
 * Changes a setup of the asker. Sessions ridden with it follow the change, so the screen offers a copy first.
 *
 * @throws AppError `not_found`, `validation`.
 */
export async function updateSetup(ctx: Context, setupId: string, input: unknown): Promise<void> {
  const ownerId = requireUserId(ctx);
  const value = parseInput(setupSchema, input);
  await ctx.db.write(async (tx) => {
    if ((await setupOf(tx, ownerId, setupId)) === undefined) throw new AppError("not_found", NOT_YOURS);
    await requireOwnParts(tx, ownerId, value);
    await tx
      .update(setup)
      .set(value)
      .where(and(eq(setup.id, setupId), eq(setup.ownerId, ownerId)));
    await audit(tx, ctx, { action: "setup.update", subjectKind: "setup", subjectId: setupId });
  });
}

/**
 * Takes a setup out of use, or back into it; its history stays.
 *
 * @throws AppError `not_found` for a setup that is not the asker's.
 */
export async function retireSetup(ctx: Context, setupId: string, retired: boolean): Promise<void> {
  const ownerId = requireUserId(ctx);
  await ctx.db.write(async (tx) => {
    if ((await setupOf(tx, ownerId, setupId)) === undefined) throw new AppError("not_found", NOT_YOURS);
    await tx
      .update(setup)
      .set({ retiredAtMs: retired ? ctx.nowMs() : null })
      .where(and(eq(setup.id, setupId), eq(setup.ownerId, ownerId)));
    await audit(tx, ctx, {
      action: retired ? "setup.retire" : "setup.unretire",
      subjectKind: "setup",
      subjectId: setupId,
    });
  });
}
