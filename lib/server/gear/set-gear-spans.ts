import { and, eq, isNull, ne } from "drizzle-orm";
import { z } from "zod";
import type { Transaction } from "@/db/client";
import { newId } from "@/db/new-id";
import { setupsOf, spansOf, type GearSpanRow } from "@/db/queries/gear";
import { gearSpan } from "@/db/schema/gear-span";
import { session } from "@/db/schema/session";
import { sessionFigures, WHOLE_SESSION } from "@/db/schema/session-figures";
import { track } from "@/db/schema/track";
import type { AnalysedTrack } from "@/lib/analysis/analysis";
import { summarise } from "@/lib/analysis/summarise";
import { AppError } from "@/lib/errors/app-error";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { figuresRow } from "@/lib/server/sessions/figures-row";
import { decodeSeries } from "@/lib/track/series-blob";

const time = z.number({ error: "Enter the time as hours and minutes." }).int();

/** Spans in order of time; an open end (null) means the session's own start or end. */
export const gearSpansSchema = z
  .array(
    z.strictObject({
      setupId: z.string().min(1, "Choose a setup.").max(40),
      startMs: time.nullable(),
      endMs: time.nullable(),
    }),
  )
  .max(20, "A session can carry up to 20 gear spans.");

type Span = { setupId: string; startMs: number; endMs: number };

function closeSpans(input: z.infer<typeof gearSpansSchema>, startMs: number, endMs: number): Span[] {
  const spans = input
    .map((span) => ({
      setupId: span.setupId,
      startMs: Math.max(span.startMs ?? startMs, startMs),
      endMs: Math.min(span.endMs ?? endMs, endMs),
    }))
    .sort((a, b) => a.startMs - b.startMs);
  for (const [index, span] of spans.entries()) {
    const before = spans[index - 1];
    const problem =
      span.endMs <= span.startMs
        ? "A gear span must end after it starts, inside the session."
        : before !== undefined && before.endMs > span.startMs
          ? "Two gear spans overlap. End the first where the next one starts."
          : null;
    if (problem !== null) throw new AppError("validation", problem, { fields: { spans: problem } });
  }
  return spans;
}

/** Writes the figures of each gear span anew from the stored track. For use inside a write. */
export async function writeSpanFigures(tx: Transaction, sessionId: string): Promise<void> {
  const owner = (await tx.select().from(session).where(eq(session.id, sessionId)).limit(1))[0];
  const stored = (await tx.select().from(track).where(eq(track.sessionId, sessionId)).limit(1))[0];
  if (owner === undefined || stored === undefined) return;
  const spans = await spansOf(tx, owner.ownerId, sessionId);
  await tx
    .delete(sessionFigures)
    .where(and(eq(sessionFigures.sessionId, sessionId), ne(sessionFigures.spanId, WHOLE_SESSION)));
  const only = spans.length === 1 ? (spans[0]?.setupId ?? null) : null;
  await tx
    .update(sessionFigures)
    .set({ setupId: only })
    .where(and(eq(sessionFigures.sessionId, sessionId), eq(sessionFigures.spanId, WHOLE_SESSION)));
  if (spans.length === 0) return;
  const analysed: AnalysedTrack = {
    series: decodeSeries(stored.series),
    segments: stored.segments,
    bumpRides: stored.bumpRides,
    lulls: stored.lulls,
    quality: stored.quality,
  };
  for (const span of spans) {
    const of = {
      sessionId,
      spanId: span.id,
      ownerId: owner.ownerId,
      setupId: span.setupId,
      discipline: owner.discipline,
    };
    await tx.insert(sessionFigures).values(figuresRow(of, summarise(analysed, span)));
  }
}

/**
 * Says which setup was ridden when; replaces what was said before. An empty list takes every tag away.
 *
 * @throws AppError `not_found` for a session that is not the asker's; `validation` for overlapping spans or a
 *   setup that is not theirs.
 */
export async function setGearSpans(ctx: Context, sessionId: string, input: unknown): Promise<GearSpanRow[]> {
  const ownerId = requireUserId(ctx);
  const asked = parseInput(gearSpansSchema, input);
  return ctx.db.write(async (tx) => {
    const found = (
      await tx
        .select({ startMs: session.startMs, endMs: session.endMs })
        .from(session)
        .where(and(eq(session.id, sessionId), eq(session.ownerId, ownerId), isNull(session.deletedAtMs)))
        .limit(1)
    )[0];
    if (found === undefined) throw new AppError("not_found", "This session is not in your log.");
    const spans = closeSpans(asked, found.startMs, found.endMs);
    const own = new Set((await setupsOf(tx, ownerId)).map((row) => row.id));
    if (spans.some((span) => !own.has(span.setupId))) {
      const problem = "Choose a setup from your quiver.";
      throw new AppError("validation", problem, { fields: { setupId: problem } });
    }
    await tx.delete(gearSpan).where(and(eq(gearSpan.sessionId, sessionId), eq(gearSpan.ownerId, ownerId)));
    const rows = spans.map((span) => ({ id: newId(), sessionId, ownerId, ...span }));
    if (rows.length > 0) await tx.insert(gearSpan).values(rows);
    await writeSpanFigures(tx, sessionId);
    await audit(tx, ctx, {
      action: "session.gear",
      subjectKind: "session",
      subjectId: sessionId,
      detail: { spans: spans.length },
    });
    return rows;
  });
}
