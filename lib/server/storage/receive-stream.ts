import { createHash } from "node:crypto";
import { open, rm, type FileHandle } from "node:fs/promises";
import type { ReceivedFile, ReceiveLimits } from "./file-storage";
import { UploadRefusedError } from "./upload-refused-error";

const NOT_WHOLE = "The file did not arrive whole. Try again; nothing of it was kept.";

/** "50 MB" */
export function megabytes(bytes: number): string {
  return `${Math.round(bytes / 1_000_000)} MB`;
}

/** The refusal of a file that is larger than one may be. */
export function tooLarge(bytesMax: number): UploadRefusedError {
  return new UploadRefusedError(
    413,
    `The file is larger than ${megabytes(bytesMax)}, the most one file may have. Split the recording, or send it gzip-compressed.`,
  );
}

/**
 * Writes a request's body to a new file, counting and hashing on the way, and makes sure it is on the disk before
 * it answers. On any failure (too large, idle, cut short, disk full) the file is removed.
 *
 * @throws UploadRefusedError with the reason in words.
 */
export async function receiveStream(
  body: ReadableStream<Uint8Array> | null,
  temporaryPath: string,
  limits: ReceiveLimits,
): Promise<ReceivedFile> {
  if (limits.declaredBytes !== null && limits.declaredBytes > limits.bytesMax)
    throw tooLarge(limits.bytesMax);
  const reader = (body ?? new Blob([]).stream()).getReader();
  const handle = await open(temporaryPath, "wx", 0o600).catch((error: unknown) => {
    throw diskError(error);
  });
  try {
    const file = await copy(reader, handle, limits);
    await handle.sync();
    await handle.close();
    return { ...file, temporaryPath };
  } catch (error) {
    // Not awaited: a sender that has gone quiet never answers a cancel either.
    reader.cancel().catch(() => undefined);
    await handle.close().catch(() => undefined);
    await rm(temporaryPath, { force: true });
    throw diskError(error);
  }
}

async function copy(
  reader: ReadableStreamDefaultReader<Uint8Array>,
  handle: FileHandle,
  limits: ReceiveLimits,
): Promise<{ sha256: string; sizeBytes: number }> {
  const hash = createHash("sha256");
  let sizeBytes = 0;
  for (;;) {
    const { done, value } = await readOrGiveUp(reader, limits.idleMs);
    if (done) break;
    sizeBytes += value.byteLength;
    if (sizeBytes > limits.bytesMax) throw tooLarge(limits.bytesMax);
    hash.update(value);
    await writeAll(handle, value);
  }
  if (limits.declaredBytes !== null && sizeBytes !== limits.declaredBytes) {
    throw new UploadRefusedError(400, NOT_WHOLE);
  }
  if (sizeBytes === 0) {
    throw new UploadRefusedError(422, "The file is empty. Export it again from the watch or the phone.");
  }
  return { sha256: hash.digest("hex"), sizeBytes };
}

async function readOrGiveUp(reader: ReadableStreamDefaultReader<Uint8Array>, idleMs: number) {
  let timer: NodeJS.Timeout | undefined;
  const idle = new Promise<never>((_, reject) => {
    timer = setTimeout(() => {
      reject(
        new UploadRefusedError(
          408,
          `Nothing arrived for ${Math.round(idleMs / 1000)} seconds, so the upload was stopped. Try again where the connection is better; nothing of it was kept.`,
        ),
      );
    }, idleMs);
  });
  try {
    return await Promise.race([
      reader.read().catch((cause: unknown) => {
        throw new UploadRefusedError(400, NOT_WHOLE, { cause });
      }),
      idle,
    ]);
  } finally {
    clearTimeout(timer);
  }
}

async function writeAll(handle: FileHandle, bytes: Uint8Array): Promise<void> {
  let written = 0;
  while (written < bytes.byteLength) {
    const result = await handle.write(bytes, written, bytes.byteLength - written);
    written += result.bytesWritten;
  }
}

/** A full disk is said in words and never half-written; everything else passes as it is. */
export function diskError(error: unknown): unknown {
  const code = error instanceof Error && "code" in error ? error.code : null;
  if (code !== "ENOSPC" && code !== "EDQUOT") return error;
  return storageFull(error);
}

/** The refusal while the disk has no room to spare. */
export function storageFull(cause?: unknown): UploadRefusedError {
  return new UploadRefusedError(
    507,
    "The server has no room left for files. Nothing of this one was kept; keep it on your device and try again later.",
    { cause },
  );
}
