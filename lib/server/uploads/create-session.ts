import type { Transaction } from "@/db/client";
import { newId } from "@/db/new-id";
import { sameOutingOf } from "@/db/queries/session";
import type { PlaceRow } from "@/db/queries/place";
import { gearSpan } from "@/db/schema/gear-span";
import { session } from "@/db/schema/session";
import { audit } from "@/lib/server/context/audit";
import type { Context } from "@/lib/server/context/context";
import { sessionTitle } from "@/lib/server/sessions/session-title";
import { analysedColumns, insertAnalysis } from "@/lib/server/sessions/write-analysis";
import type { AnalysedFile } from "@/lib/worker/analysis-task";
import type { FileVerdict } from "@/lib/display/file-verdict";

/** Two recordings that begin and end within this are the same outing: formats round times differently. */
const SAME_OUTING_MS = 2000;

export type NewSession = {
  readonly ownerId: string;
  readonly uploadId: string;
  readonly setupId: string | null;
  readonly places: readonly PlaceRow[];
};

/** One analysed track becomes a session with everything that belongs to it. For use inside a write. */
export async function createSession(
  tx: Transaction,
  ctx: Context,
  of: NewSession,
  analysed: AnalysedFile,
): Promise<FileVerdict> {
  const { ownerId, uploadId, setupId } = of;
  const sessionId = newId();
  const title = sessionTitle(analysed.discipline, analysed, of.places);
  const columns = analysedColumns(analysed);
  const sameAs = await sameOutingOf(tx, ownerId, {
    uploadId,
    startMs: columns.startMs,
    firstFixMs: analysed.firstFixMs,
    lastFixMs: analysed.lastFixMs,
    toleranceMs: SAME_OUTING_MS,
  });
  await tx.insert(session).values({
    id: sessionId,
    ownerId,
    uploadId,
    entryName: analysed.entryName,
    title,
    createdAtMs: ctx.nowMs(),
    ...columns,
  });
  if (setupId !== null && columns.endMs > columns.startMs) {
    const { startMs, endMs } = columns;
    await tx.insert(gearSpan).values({ id: newId(), sessionId, ownerId, setupId, startMs, endMs });
  }
  await insertAnalysis(tx, { sessionId, ownerId }, analysed);
  await audit(tx, ctx, {
    action: "session.create",
    subjectKind: "session",
    subjectId: sessionId,
    detail: { uploadId, analysisVersion: analysed.version },
  });
  return {
    kind: "read",
    entryName: analysed.entryName,
    sessionId,
    title,
    startMs: columns.startMs,
    timeZone: analysed.timeZone,
    waterDistanceM: analysed.figures.waterDistanceM,
    elapsedS: analysed.figures.elapsedS,
    cutBeforeS: Math.max(0, (analysed.window.startMs - analysed.firstFixMs) / 1000),
    cutAfterS: Math.max(0, (analysed.lastFixMs - analysed.window.endMs) / 1000),
    notes: analysed.quality.notes.map((note) => note.text),
    sameAs: sameAs === undefined ? null : { sessionId: sameAs.id, title: sameAs.title },
  };
}
