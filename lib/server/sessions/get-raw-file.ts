import { Readable } from "node:stream";
import { sessionWithFigures } from "@/db/queries/session";
import { AppError } from "@/lib/errors/app-error";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { storage } from "@/lib/server/storage/storage";
import { NOT_IN_LOG } from "./require-session";

/**
 * The file a session of the asker came from, byte for byte as it was uploaded.
 *
 * @throws AppError `unauthenticated`, `not_found`; `internal` when the store has lost it.
 */
export async function getRawFile(
  ctx: Context,
  sessionId: string,
): Promise<{ stream: ReadableStream<Uint8Array>; sizeBytes: number; fileName: string }> {
  const found = await sessionWithFigures(ctx.db.read, requireUserId(ctx), sessionId);
  if (found === undefined || found.session.deletedAtMs !== null) throw new AppError("not_found", NOT_IN_LOG);
  const { stream, sizeBytes } = await storage().openRead(found.sha256);
  return {
    stream: Readable.toWeb(stream) as ReadableStream<Uint8Array>,
    sizeBytes,
    fileName: found.fileName,
  };
}

/**
 * The header that makes a browser save an answer under a name (RFC 6266): an ASCII form for old readers, the name itself in
 * UTF-8 percent-encoding (RFC 8187).
 *
 * @example
 * contentDisposition("søndag \"1\".gpx"); // "attachment; filename=\"s_ndag _1_.gpx\"; filename*=UTF-8''s%C3%B8ndag%20%221%22.gpx"
 */
export function contentDisposition(fileName: string): string {
  const plain = fileName.replace(/[^\x20-\x7e]|["\\%]/g, "_");
  const encoded = encodeURIComponent(fileName).replace(
    /['()*]/g,
    (character) => `%${character.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
