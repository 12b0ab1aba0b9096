import { uploadOf } from "@/db/queries/upload";
import type { SessionRow } from "@/db/queries/session";
import type { Discipline } from "@/lib/analysis/analysis";
import { AppError } from "@/lib/errors/app-error";
import type { Context } from "@/lib/server/context/context";
import { analyseStored } from "@/lib/server/uploads/analyse-stored";
import type { Stretch } from "@/lib/track/speed-series";
import type { AnalysedFile } from "@/lib/worker/analysis-task";

/** The session's own ends, or null when they are the detected ones. */
export function trimOf(row: SessionRow): Stretch | null {
  return row.trimStartMs === null || row.trimEndMs === null
    ? null
    : { startMs: row.trimStartMs, endMs: row.trimEndMs };
}

/**
 * Walks a session's way again from its raw file: read, cleaned, analysed. Nothing is written yet.
 *
 * @throws AppError `precondition` with the reader's own sentence when the file gives no track any more.
 */
export async function analyseAgain(
  ctx: Context,
  row: SessionRow,
  options: { readonly discipline: Discipline; readonly trim: Stretch | null },
): Promise<AnalysedFile> {
  const file = await uploadOf(ctx.db.read, row.ownerId, row.uploadId);
  if (file === undefined) throw new AppError("internal", "The recorded file of this session is missing.");
  const outcomes = await analyseStored(file, {
    ...options,
    minimumFlyingSpeedMps: null,
    entryName: row.entryName,
  });
  const outcome = outcomes.find((one) => one.entryName === row.entryName) ?? outcomes[0];
  if (outcome?.kind === "read") return outcome;
  throw new AppError(
    "precondition",
    outcome?.text ?? "The recorded file of this session gives no track any more. Upload it again.",
  );
}
