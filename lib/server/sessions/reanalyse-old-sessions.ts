import { sessionOf, sessionsOfOlderAnalysis } from "@/db/queries/session";
import { ANALYSIS_VERSION } from "@/lib/analysis/analysis";
import { AppError } from "@/lib/errors/app-error";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { analyseAgain, trimOf } from "./reanalyse-session";
import { replaceAnalysis } from "./write-analysis";

export type Reanalysed = { readonly sessionId: string; readonly problem: string | null };

/**
 * Walks every session that an older analysis made again from its raw file, one after the other, deleted ones too, since they can come
 * back. One that fails keeps the figures it has. What riders said about their sessions stays.
 *
 * @throws AppError `forbidden` for anybody but the system.
 */
export async function reanalyseOldSessions(
  ctx: Context,
  onEach: (one: Reanalysed) => void,
): Promise<{ done: number; failed: number }> {
  if (ctx.actor.kind !== "system") throw new AppError("forbidden", "Only the server itself may do this.");
  const count = { done: 0, failed: 0 };
  for (const { id, ownerId } of await sessionsOfOlderAnalysis(ctx.db.read, ANALYSIS_VERSION)) {
    const problem = await reanalyseOne(ctx, ownerId, id).then(
      () => null,
      (error: unknown) => (error instanceof Error ? error.message : String(error)),
    );
    if (problem === null) count.done += 1;
    else count.failed += 1;
    onEach({ sessionId: id, problem });
  }
  return count;
}

async function reanalyseOne(ctx: Context, ownerId: string, sessionId: string): Promise<void> {
  const row = await sessionOf(ctx.db.read, ownerId, sessionId);
  if (row === undefined) return;
  const analysed = await analyseAgain(ctx, row, { discipline: row.discipline, trim: trimOf(row) });
  await ctx.db.write(async (tx) => {
    const now = await sessionOf(tx, ownerId, sessionId);
    if (now === undefined) return;
    const { trimStartMs, trimEndMs } = now;
    await replaceAnalysis(tx, now, analysed, { trimStartMs, trimEndMs });
    await audit(tx, ctx, {
      action: "session.reanalyse",
      subjectKind: "session",
      subjectId: sessionId,
      detail: { from: row.analysisVersion, to: analysed.version },
    });
  });
}
