import { z } from "zod";
import { AppError } from "@/lib/errors/app-error";
import { trackOf } from "@/db/queries/session";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { analyseAgain, trimOf } from "./reanalyse-session";
import { changedMeanwhile, requireSession } from "./require-session";
import { replaceAnalysis } from "./write-analysis";

/** Shorter than this nothing can be said about a session, ms. */
const LENGTH_MS_MIN = 10_000;

const time = z.number({ error: "Enter the time as hours, minutes and seconds." }).int();

/** The rider's own ends, or null for the detected ones. */
export const trimSchema = z
  .strictObject({ startMs: time, endMs: time })
  .refine((value) => value.endMs - value.startMs >= LENGTH_MS_MIN, {
    path: ["endMs"],
    message: "The end must be at least 10 seconds after the start.",
  })
  .nullable();

/**
 * Sets both ends of a session of the asker by hand, or takes that back (null), and works every figure out again.
 *
 * @throws AppError `unauthenticated`, `not_found`; `validation` for ends outside the recording; `conflict` when
 *   the session was changed in another window meanwhile.
 */
export async function trimSession(ctx: Context, sessionId: string, input: unknown): Promise<void> {
  const ownerId = requireUserId(ctx);
  const trim = parseInput(trimSchema, input);
  const row = await requireSession(ctx.db.read, ownerId, sessionId);
  if (trim !== null) await requireInside(ctx, ownerId, sessionId, trim);
  const analysed = await analyseAgain(ctx, row, { discipline: row.discipline, trim });
  await ctx.db.write(async (tx) => {
    const now = await requireSession(tx, ownerId, sessionId);
    if (now.discipline !== row.discipline || !sameTrim(trimOf(now), trimOf(row))) throw changedMeanwhile();
    const trimStartMs = trim?.startMs ?? null;
    const trimEndMs = trim?.endMs ?? null;
    await replaceAnalysis(tx, now, analysed, { trimStartMs, trimEndMs });
    await audit(tx, ctx, {
      action: "session.trim",
      subjectKind: "session",
      subjectId: sessionId,
      detail: { trimStartMs, trimEndMs },
    });
  });
}

type Ends = { readonly startMs: number; readonly endMs: number };

function sameTrim(a: Ends | null, b: Ends | null): boolean {
  return a?.startMs === b?.startMs && a?.endMs === b?.endMs;
}

async function requireInside(ctx: Context, ownerId: string, sessionId: string, trim: Ends): Promise<void> {
  const stored = await trackOf(ctx.db.read, ownerId, sessionId);
  if (stored === undefined) return;
  const { firstFixMs, lastFixMs } = stored.track;
  const fields: Record<string, string> = {};
  if (trim.startMs < firstFixMs || trim.startMs > lastFixMs) {
    fields["startMs"] = "The start must lie inside the recording.";
  }
  if (trim.endMs < firstFixMs || trim.endMs > lastFixMs + 1000) {
    fields["endMs"] = "The end must lie inside the recording.";
  }
  if (Object.keys(fields).length === 0) return;
  throw new AppError("validation", "There is a problem with what was entered.", { fields });
}
