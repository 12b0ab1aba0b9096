"use server";

import { z } from "zod";
import type { Done, PlainFile, PlainUpload } from "@/components/upload/upload-actions";
import type { ImportResult } from "@/components/upload/upload-item";
import { describeError } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";
import { parseInput } from "@/lib/server/input/parse-input";
import { setGearSpans } from "@/lib/server/gear/set-gear-spans";
import { restoreSession } from "@/lib/server/sessions/delete-session";
import { importUpload } from "@/lib/server/uploads/import-upload";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { FILES_AT_ONCE_MAX } from "@/lib/server/uploads/upload-limits";

/** Reads one stored file. One call a file, so that each verdict comes as soon as it is there. */
export async function importFileAction(uploadId: string, setupId: string | null): Promise<ImportResult> {
  try {
    return { ok: true, verdicts: await importUpload(await requestContext(), { uploadId, setupId }) };
  } catch (error) {
    const { code, message } = await describeError(error);
    return { ok: false, message, signedOut: code === "unauthenticated" };
  }
}

export async function restoreSessionAction(sessionId: string): Promise<Done> {
  return done(async () => {
    const id = parseInput(z.string().max(40), sessionId);
    await restoreSession(await requestContext(), id);
  });
}

/** Tags sessions as ridden on one setup from end to end, or takes their tags off. */
export async function tagSessionsAction(
  sessionIds: readonly string[],
  setupId: string | null,
): Promise<Done> {
  return done(async () => {
    const ctx = await requestContext();
    const ids = parseInput(z.array(z.string().max(40)).max(2000), sessionIds);
    const spans = setupId === null ? [] : [{ setupId, startMs: null, endMs: null }];
    for (const sessionId of ids) await setGearSpans(ctx, sessionId, spans);
  });
}

async function done(work: () => Promise<unknown>): Promise<Done> {
  try {
    await work();
    return { ok: true };
  } catch (error) {
    return { ok: false, message: (await describeError(error)).message };
  }
}

/** The page's form as a browser without JavaScript sends it: small files, stored and read at once. */
export async function sendPlainAction(_: PlainUpload, form: FormData): Promise<PlainUpload> {
  if (!(form instanceof FormData))
    return { problem: "No file arrived. Choose one or more, then send.", files: [] };
  const sent = form.getAll("files").filter((one) => one instanceof File && one.name !== "") as File[];
  if (sent.length === 0) return { problem: "No file was chosen. Choose one or more, then send.", files: [] };
  if (sent.length > FILES_AT_ONCE_MAX) {
    return { problem: `Up to ${FILES_AT_ONCE_MAX} files go at once. Choose fewer.`, files: [] };
  }
  const setupId = formText(form, "setupId");
  const files: PlainFile[] = [];
  for (const file of sent) files.push(await takePlain(file, setupId === "" ? null : setupId));
  return { problem: "", files };
}

async function takePlain(file: File, setupId: string | null): Promise<PlainFile> {
  try {
    const ctx = await requestContext();
    const { uploadId } = await receiveUpload(ctx, {
      fileName: file.name,
      body: file.stream(),
      declaredBytes: file.size,
    });
    const verdicts = await importUpload(ctx, { uploadId, setupId });
    return { name: file.name, problem: "", verdicts };
  } catch (error) {
    return { name: file.name, problem: (await describeError(error)).message, verdicts: [] };
  }
}
