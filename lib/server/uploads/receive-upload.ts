import { newId } from "@/db/new-id";
import { sessionsOfUpload, storedBytes, uploadBySha256 } from "@/db/queries/upload";
import { upload } from "@/db/schema/upload";
import { audit } from "@/lib/server/context/audit";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { env } from "@/lib/server/env/env";
import type { ReceivedFile } from "@/lib/server/storage/file-storage";
import { megabytes, storageFull, tooLarge } from "@/lib/server/storage/receive-stream";
import { storage } from "@/lib/server/storage/storage";
import { UploadRefusedError } from "@/lib/server/storage/upload-refused-error";
import { takeTurn, waitWords } from "@/lib/server/throttle/throttle";
import { cleanFileName } from "./file-name";
import { FILE_BYTES_MAX, IDLE_MS, QUOTA_BYTES, UPLOADS_PER_DAY, UPLOADS_PER_HOUR } from "./upload-limits";

export type IncomingFile = {
  readonly fileName: string;
  readonly body: ReadableStream<Uint8Array> | null;
  /** The length the sender declared, or null. */
  readonly declaredBytes: number | null;
  readonly idleMs?: number;
};

export type StoredUpload = {
  readonly uploadId: string;
  readonly sha256: string;
  /** Set when the asker sent exactly these bytes before. */
  readonly duplicate: { readonly sessionIds: readonly string[] } | null;
};

/**
 * Takes one file of the asker into the store. When this resolves, bytes and row outlive a power cut; when it rejects, or the process
 * dies on the way, there is no row, and bytes without a row are swept away at the next start.
 *
 * @throws AppError `unauthenticated`; UploadRefusedError for a file that is too large, empty or cut short, for an
 *   account or a disk that is full, and for too many uploads in a short time.
 */
export async function receiveUpload(ctx: Context, incoming: IncomingFile): Promise<StoredUpload> {
  const ownerId = requireUserId(ctx);
  const { declaredBytes } = incoming;
  if (declaredBytes !== null && declaredBytes > FILE_BYTES_MAX) throw tooLarge(FILE_BYTES_MAX);
  await requireTurn(ctx, ownerId);
  await requireRoom(declaredBytes ?? FILE_BYTES_MAX);
  const file = await storage().receive(incoming.body, {
    bytesMax: FILE_BYTES_MAX,
    idleMs: incoming.idleMs ?? IDLE_MS,
    declaredBytes,
  });
  try {
    return await keepUpload(ctx, ownerId, file, cleanFileName(incoming.fileName));
  } catch (error) {
    await storage().discard(file);
    throw error;
  }
}

/**
 * Bytes first, row second, both inside one turn of the write queue: a purge of the same bytes takes its own turn before or
 * after, never between.
 */
async function keepUpload(
  ctx: Context,
  ownerId: string,
  file: ReceivedFile,
  fileName: string,
): Promise<StoredUpload> {
  return ctx.db.write(async (tx) => {
    const before = await uploadBySha256(tx, ownerId, file.sha256);
    if (before === undefined && (await storedBytes(tx, ownerId)) + file.sizeBytes > QUOTA_BYTES) {
      throw new UploadRefusedError(
        413,
        `Your account holds ${megabytes(QUOTA_BYTES)} of files, which is all it may. Delete sessions you no longer need.`,
      );
    }
    await storage().keep(file);
    if (before !== undefined) {
      const sessions = await sessionsOfUpload(tx, ownerId, before.id);
      return {
        uploadId: before.id,
        sha256: file.sha256,
        duplicate: { sessionIds: sessions.map((row) => row.id) },
      };
    }
    const uploadId = newId();
    await tx.insert(upload).values({
      id: uploadId,
      ownerId,
      sha256: file.sha256,
      sizeBytes: file.sizeBytes,
      fileName,
      status: "stored",
      verdicts: [],
      createdAtMs: ctx.nowMs(),
    });
    await audit(tx, ctx, {
      action: "upload.store",
      subjectKind: "upload",
      subjectId: uploadId,
      detail: { sizeBytes: file.sizeBytes },
    });
    return { uploadId, sha256: file.sha256, duplicate: null };
  });
}

async function requireTurn(ctx: Context, ownerId: string): Promise<void> {
  const waitMs = await ctx.db.write(async (tx) => {
    const wait = await takeTurn(tx, UPLOADS_PER_HOUR, ownerId, ctx.nowMs());
    return wait > 0 ? wait : takeTurn(tx, UPLOADS_PER_DAY, ownerId, ctx.nowMs());
  });
  if (waitMs === 0) return;
  throw new UploadRefusedError(
    429,
    `That is more than ${UPLOADS_PER_HOUR.free} files in an hour or ${UPLOADS_PER_DAY.free} in a day. Go on in ${waitWords(waitMs)}; what is up is safe.`,
  );
}

async function requireRoom(bytes: number): Promise<void> {
  const free = await storage().freeBytes();
  if (free !== null && free - bytes < env().minFreeDiskMb * 1_000_000) throw storageFull();
}
