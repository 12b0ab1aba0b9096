import {
  lastUsedSetupOf,
  partOf,
  partsOf,
  setupOf,
  setupsOf,
  setupUse,
  spansOf,
  type GearSpanRow,
  type PartRow,
  type SetupRow,
} from "@/db/queries/gear";
import { AppError } from "@/lib/errors/app-error";
import { requireUserId, type Context } from "@/lib/server/context/context";

/** The asker's parts, retired ones last. */
export async function listParts(ctx: Context): Promise<PartRow[]> {
  return partsOf(ctx.db.read, requireUserId(ctx));
}

/** One part of the asker. @throws AppError `not_found`. */
export async function getPart(ctx: Context, partId: string): Promise<PartRow> {
  const row = await partOf(ctx.db.read, requireUserId(ctx), partId);
  if (row === undefined) throw new AppError("not_found", "This part is not in your quiver.");
  return row;
}

export type SetupWithUse = SetupRow & { readonly spans: number; readonly lastRiddenMs: number | null };

/** The asker's setups with how often each was ridden and when last. */
export async function listSetups(ctx: Context): Promise<SetupWithUse[]> {
  const ownerId = requireUserId(ctx);
  const [rows, use] = await Promise.all([setupsOf(ctx.db.read, ownerId), setupUse(ctx.db.read, ownerId)]);
  const bySetup = new Map(use.map((row) => [row.setupId, row]));
  return rows.map((row) => ({
    ...row,
    spans: bySetup.get(row.id)?.spans ?? 0,
    lastRiddenMs: bySetup.get(row.id)?.lastMs ?? null,
  }));
}

/** One setup of the asker. @throws AppError `not_found`. */
export async function getSetup(ctx: Context, setupId: string): Promise<SetupRow> {
  const row = await setupOf(ctx.db.read, requireUserId(ctx), setupId);
  if (row === undefined) throw new AppError("not_found", "This setup is not in your quiver.");
  return row;
}

/** The setup ridden last, offered at upload; null when none was ever tagged. */
export async function lastUsedSetup(ctx: Context): Promise<{ id: string; name: string } | null> {
  const row = await lastUsedSetupOf(ctx.db.read, requireUserId(ctx));
  return row === undefined ? null : { id: row.id, name: row.name };
}

/** The gear spans of a session of the asker, in order of time; empty for a session that is not theirs. */
export async function listGearSpans(ctx: Context, sessionId: string): Promise<GearSpanRow[]> {
  return spansOf(ctx.db.read, requireUserId(ctx), sessionId);
}
