import { and, eq } from "drizzle-orm";
import { z } from "zod";
import { placesOf } from "@/db/queries/place";
import type { SessionRow } from "@/db/queries/session";
import { DISCIPLINES, session } from "@/db/schema/session";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import { analyseAgain, trimOf } from "./reanalyse-session";
import { changedMeanwhile, requireSession } from "./require-session";
import { endsOf, sessionTitle } from "./session-title";
import { replaceAnalysis } from "./write-analysis";

const text = (lengthMax: number) =>
  z
    .string()
    .trim()
    .max(lengthMax, `Use at most ${lengthMax.toLocaleString("en")} characters.`);

const quantity = (max: number, unit: string) =>
  z
    .number({ error: "Enter a number." })
    .min(0, "Enter a number of 0 or more.")
    .max(max, `Enter a number up to ${max} ${unit}.`)
    .nullable();

/** What a rider may say about a session; SI units, wind direction where it comes from. A field that is not given stays as it is. */
export const sessionChangeSchema = z.strictObject({
  /** Empty: the title is made from place names again. */
  title: text(120).optional(),
  spot: text(80).optional(),
  discipline: z.enum(DISCIPLINES, { error: "Choose a discipline." }).optional(),
  windFromDeg: z
    .number({ error: "Enter the direction in degrees." })
    .min(0, "Enter a direction from 0 to 360 degrees.")
    .max(360, "Enter a direction from 0 to 360 degrees.")
    .transform((value) => value % 360)
    .nullable()
    .optional(),
  windSpeedMps: quantity(60, "m/s").optional(),
  wavePeriodS: quantity(30, "s").optional(),
  waveHeightM: quantity(20, "m").optional(),
  water: z.enum(["sea", "bay", "lake", "river"], { error: "Choose the water." }).nullable().optional(),
  notes: text(10_000).optional(),
});

export type SessionChange = z.infer<typeof sessionChangeSchema>;

/**
 * Changes what the asker said about one of their sessions. Another discipline works the figures out again, as it changes
 * how a take-off is told.
 *
 * @throws AppError `unauthenticated`, `not_found`, `validation`; `conflict` when the session was changed in another window meanwhile.
 */
export async function updateSession(ctx: Context, sessionId: string, input: unknown): Promise<void> {
  const ownerId = requireUserId(ctx);
  const change = parseInput(sessionChangeSchema, input);
  const row = await requireSession(ctx.db.read, ownerId, sessionId);
  const discipline = change.discipline ?? row.discipline;
  const analysed =
    discipline === row.discipline ? null : await analyseAgain(ctx, row, { discipline, trim: trimOf(row) });
  await ctx.db.write(async (tx) => {
    const now = await requireSession(tx, ownerId, sessionId);
    const places = await placesOf(tx, ownerId);
    const after: SessionRow = { ...now, ...change, ...titleAfter(now, change, discipline, places) };
    if (analysed !== null) {
      if (now.trimStartMs !== row.trimStartMs || now.trimEndMs !== row.trimEndMs) throw changedMeanwhile();
      const { trimStartMs, trimEndMs } = now;
      await replaceAnalysis(tx, now, analysed, { trimStartMs, trimEndMs });
    }
    await tx
      .update(session)
      .set(ownWords(after))
      .where(and(eq(session.id, sessionId), eq(session.ownerId, ownerId)));
    await audit(tx, ctx, {
      action: "session.update",
      subjectKind: "session",
      subjectId: sessionId,
      detail: { fields: Object.keys(change) },
    });
  });
}

function titleAfter(
  now: SessionRow,
  change: SessionChange,
  discipline: SessionRow["discipline"],
  places: Parameters<typeof sessionTitle>[2],
): Pick<SessionRow, "title" | "titleIsOwn"> {
  const { title } = change;
  if (title !== undefined && title !== "" && title !== now.title) return { title, titleIsOwn: true };
  const isOwn = title === "" ? false : now.titleIsOwn;
  const ends = endsOf(now);
  if (isOwn || ends === null) return { title: now.title, titleIsOwn: isOwn };
  return { title: sessionTitle(discipline, ends, places), titleIsOwn: false };
}

/** The columns that are the rider's to write. */
function ownWords(row: SessionRow) {
  const { title, titleIsOwn, spot, windFromDeg, windSpeedMps, wavePeriodS, waveHeightM, water, notes } = row;
  return { title, titleIsOwn, spot, windFromDeg, windSpeedMps, wavePeriodS, waveHeightM, water, notes };
}
