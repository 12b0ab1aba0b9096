import { createHash } from "node:crypto";
import { trackOf } from "@/db/queries/session";
import { encodeTrackPayload } from "@/lib/analysis/track-payload";
import { AppError } from "@/lib/errors/app-error";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { NOT_IN_LOG } from "./require-session";

/** The bytes that decodeTrackPayload reads, and a name for this very state of them. */
export type StoredPayload = { readonly bytes: Uint8Array<ArrayBuffer>; readonly etag: string };

/**
 * The analysed track of a session of the asker as one binary answer.
 *
 * @throws AppError `unauthenticated`, `not_found`.
 */
export async function getTrackPayload(ctx: Context, sessionId: string): Promise<StoredPayload> {
  const found = await trackOf(ctx.db.read, requireUserId(ctx), sessionId);
  if (found === undefined) throw new AppError("not_found", NOT_IN_LOG);
  const { track, version } = found;
  const bytes = encodeTrackPayload({
    series: track.series,
    segments: track.segments,
    bumpRides: track.bumpRides,
    lulls: track.lulls,
    quality: track.quality,
    window: { startMs: track.windowStartMs, endMs: track.windowEndMs },
    version,
  });
  const etag = `"${createHash("sha256").update(bytes).digest("base64url").slice(0, 27)}"`;
  return { bytes, etag };
}
