import { eq } from "drizzle-orm";
import type { Transaction } from "@/db/client";
import { placesOf } from "@/db/queries/place";
import type { SessionRow } from "@/db/queries/session";
import { gearSpan } from "@/db/schema/gear-span";
import { session } from "@/db/schema/session";
import { sessionFigures, WHOLE_SESSION } from "@/db/schema/session-figures";
import { track } from "@/db/schema/track";
import { writeSpanFigures } from "@/lib/server/gear/set-gear-spans";
import type { AnalysedFile } from "@/lib/worker/analysis-task";
import { figuresRow } from "./figures-row";
import { sessionTitle } from "./session-title";

/** What the analysis says about a session's own row. */
export function analysedColumns(analysed: AnalysedFile) {
  return {
    format: analysed.format,
    discipline: analysed.discipline,
    timeZone: analysed.timeZone,
    startMs: Math.round(analysed.window.startMs),
    endMs: Math.round(analysed.window.endMs),
    startLatDeg: analysed.from.latDeg,
    startLonDeg: analysed.from.lonDeg,
    endLatDeg: analysed.to.latDeg,
    endLonDeg: analysed.to.lonDeg,
    qualityGrade: analysed.quality.grade,
    analysisVersion: analysed.version,
  };
}

/** Writes a track and its figures for a session that has none yet. For use inside a write. */
export async function insertAnalysis(
  tx: Transaction,
  of: { sessionId: string; ownerId: string },
  analysed: AnalysedFile,
): Promise<void> {
  await tx.insert(track).values({ ...of, ...trackColumns(analysed) });
  const row = { ...of, spanId: WHOLE_SESSION, setupId: null, discipline: analysed.discipline };
  await tx.insert(sessionFigures).values(wholeRow(row, analysed));
  await writeSpanFigures(tx, of.sessionId);
}

/**
 * Puts a new analysis of the same file in the place of the one before: session row, title unless it is the rider's own, track,
 * figures; gear spans are cut to the new ends. For use inside a write.
 */
export async function replaceAnalysis(
  tx: Transaction,
  before: SessionRow,
  analysed: AnalysedFile,
  changes: { trimStartMs: number | null; trimEndMs: number | null },
): Promise<void> {
  const columns = analysedColumns(analysed);
  const title = before.titleIsOwn
    ? before.title
    : sessionTitle(analysed.discipline, analysed, await placesOf(tx, before.ownerId));
  await tx
    .update(session)
    .set({ ...columns, ...changes, title })
    .where(eq(session.id, before.id));
  await tx.delete(track).where(eq(track.sessionId, before.id));
  await tx.delete(sessionFigures).where(eq(sessionFigures.sessionId, before.id));
  await fitSpans(tx, before, columns);
  await insertAnalysis(tx, { sessionId: before.id, ownerId: before.ownerId }, analysed);
}

/** A span that reached an old end of the session reaches the new one; one that lies outside now is gone. */
async function fitSpans(
  tx: Transaction,
  before: SessionRow,
  after: { startMs: number; endMs: number },
): Promise<void> {
  const spans = await tx.select().from(gearSpan).where(eq(gearSpan.sessionId, before.id));
  for (const span of spans) {
    const startMs = span.startMs <= before.startMs ? after.startMs : Math.max(span.startMs, after.startMs);
    const endMs = span.endMs >= before.endMs ? after.endMs : Math.min(span.endMs, after.endMs);
    if (endMs <= startMs) await tx.delete(gearSpan).where(eq(gearSpan.id, span.id));
    else await tx.update(gearSpan).set({ startMs, endMs }).where(eq(gearSpan.id, span.id));
  }
}

function wholeRow(of: Parameters<typeof figuresRow>[0], analysed: AnalysedFile) {
  const row = figuresRow(of, analysed.figures);
  return { ...row, startMs: Math.round(row.startMs) };
}

function trackColumns(analysed: AnalysedFile) {
  return {
    series: Buffer.from(analysed.series),
    segments: [...analysed.segments],
    bumpRides: [...analysed.bumpRides],
    lulls: [...analysed.lulls],
    quality: analysed.quality,
    windowStartMs: Math.round(analysed.window.startMs),
    windowEndMs: Math.round(analysed.window.endMs),
    firstFixMs: Math.round(analysed.firstFixMs),
    lastFixMs: Math.round(analysed.lastFixMs),
  };
}
