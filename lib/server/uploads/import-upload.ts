import { and, eq } from "drizzle-orm";
import { z } from "zod";
import { setupOf } from "@/db/queries/gear";
import { placesOf } from "@/db/queries/place";
import { lastDisciplineOf } from "@/db/queries/session";
import { sessionsOfUpload, uploadOf, type UploadRow } from "@/db/queries/upload";
import type { Transaction } from "@/db/client";
import { upload, type UploadVerdict } from "@/db/schema/upload";
import { AppError } from "@/lib/errors/app-error";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { parseInput } from "@/lib/server/input/parse-input";
import type { TrackOutcome } from "@/lib/worker/analysis-task";
import { analyseStored } from "./analyse-stored";
import { createSession } from "./create-session";
import type { FileVerdict } from "@/lib/display/file-verdict";

const importSchema = z.strictObject({
  uploadId: z.string().min(1).max(40),
  setupId: z.string().min(1).max(40).nullable(),
});

/** Imports under way in this process: asking for the same file again waits for the same answer. */
const underWay = new Map<string, Promise<FileVerdict[]>>();

/**
 * Reads a stored file of the asker and turns each track in it into a session: parsed and analysed in the worker pool, then
 * session, track, figures, gear span, verdicts and audit rows in one write, or nothing. However often and from wherever it is asked,
 * a track becomes one session; later askers are told that it is there already.
 *
 * @throws AppError `unauthenticated`, `validation`; `not_found` for an upload or a setup that is not the asker's.
 */
export async function importUpload(ctx: Context, input: unknown): Promise<FileVerdict[]> {
  const ownerId = requireUserId(ctx);
  const { uploadId, setupId } = parseInput(importSchema, input);
  const row = await uploadOf(ctx.db.read, ownerId, uploadId);
  if (row === undefined)
    throw new AppError("not_found", "This file is not among your uploads. Send it again.");
  if (setupId !== null) await requireSetup(ctx, ownerId, setupId);
  const before = underWay.get(uploadId);
  if (before !== undefined) return before;
  const work = importStored(ctx, row, setupId).finally(() => underWay.delete(uploadId));
  underWay.set(uploadId, work);
  return work;
}

async function requireSetup(ctx: Context, ownerId: string, setupId: string): Promise<void> {
  if ((await setupOf(ctx.db.read, ownerId, setupId)) === undefined) {
    throw new AppError("not_found", "This setup is not in your quiver. Choose another, or none.");
  }
}

async function importStored(ctx: Context, row: UploadRow, setupId: string | null): Promise<FileVerdict[]> {
  const { ownerId } = row;
  const known = await knownVerdicts(ctx.db.read, row);
  if (row.status === "done" && known.length === row.verdicts.length) return known;
  // Downwind or wing is seen from the track; neither is what a rider of something else said last time.
  const discipline = (await lastDisciplineOf(ctx.db.read, ownerId)) === "other" ? "other" : null;
  const outcomes = await analyseStored(row, {
    discipline,
    trim: null,
    minimumFlyingSpeedMps: null,
    entryName: null,
  });
  return ctx.db.write((tx) => writeOutcomes(tx, ctx, { row, setupId, outcomes }));
}

/** What is in the log from this file already, live or deleted. */
async function knownVerdicts(db: Parameters<typeof sessionsOfUpload>[0], row: UploadRow) {
  const sessions = await sessionsOfUpload(db, row.ownerId, row.id);
  return sessions.map((found): FileVerdict => ({
    kind: found.deletedAtMs === null ? "already" : "deleted",
    entryName: found.entryName,
    sessionId: found.id,
    title: found.title,
  }));
}

async function writeOutcomes(
  tx: Transaction,
  ctx: Context,
  { row, setupId, outcomes }: { row: UploadRow; setupId: string | null; outcomes: readonly TrackOutcome[] },
): Promise<FileVerdict[]> {
  const of = {
    ownerId: row.ownerId,
    uploadId: row.id,
    setupId,
    places: await placesOf(tx, row.ownerId),
  };
  const known = new Map((await knownVerdicts(tx, row)).map((verdict) => [verdict.entryName, verdict]));
  const verdicts: FileVerdict[] = [];
  for (const outcome of outcomes) {
    const before = known.get(outcome.entryName);
    if (outcome.kind === "refused") verdicts.push(before ?? outcome);
    else verdicts.push(before ?? (await createSession(tx, ctx, of, outcome)));
  }
  await tx
    .update(upload)
    .set({ status: "done", verdicts: verdicts.map(storedVerdict) })
    .where(and(eq(upload.id, row.id), eq(upload.ownerId, row.ownerId)));
  await audit(tx, ctx, {
    action: "upload.import",
    subjectKind: "upload",
    subjectId: row.id,
    detail: { verdicts: verdicts.map(({ kind, entryName }) => ({ kind, entryName })) },
  });
  return verdicts;
}

function storedVerdict(verdict: FileVerdict): UploadVerdict {
  if (verdict.kind === "refused") {
    const { kind, entryName, code, text } = verdict;
    return { kind, entryName, code, text };
  }
  const notes = verdict.kind === "read" ? [...verdict.notes] : [];
  return { kind: "read", entryName: verdict.entryName, sessionId: verdict.sessionId, notes };
}
