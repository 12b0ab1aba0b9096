import { createReadStream } from "node:fs";
import { mkdir, open, opendir, readdir, rename, rm, stat, statfs } from "node:fs/promises";
import path from "node:path";
import { newId } from "@/db/new-id";
import { AppError } from "@/lib/errors/app-error";
import type { FileStorage, ReceivedFile } from "./file-storage";
import { diskError, receiveStream } from "./receive-stream";

const SHA256 = /^[0-9a-f]{64}$/;

/**
 * Raw files in a folder: `files/ab/cd/abcd...` by hash, incoming ones in `incoming/` on the same disk, so that keeping one is a rename.
 * A file appears under its hash whole or not at all.
 */
export function diskStorage(root: string): FileStorage {
  const files = path.join(root, "files");
  const incoming = path.join(root, "incoming");

  const pathOf = (sha256: string): string => {
    if (!SHA256.test(sha256)) throw new Error("not a SHA-256 in hexadecimal");
    return path.join(files, sha256.slice(0, 2), sha256.slice(2, 4), sha256);
  };

  const sizeOf = (sha256: string): Promise<number | null> =>
    stat(pathOf(sha256)).then(
      (found) => found.size,
      () => null,
    );

  return {
    receive: async (body, limits) => {
      await mkdir(incoming, { recursive: true });
      return receiveStream(body, path.join(incoming, newId()), limits);
    },
    keep: async (file) => {
      try {
        await moveForGood(file, pathOf(file.sha256), files);
      } catch (error) {
        await rm(file.temporaryPath, { force: true });
        throw diskError(error);
      }
    },
    discard: (file) => rm(file.temporaryPath, { force: true }),
    has: async (sha256) => (await sizeOf(sha256)) !== null,
    openRead: async (sha256) => {
      const sizeBytes = await sizeOf(sha256);
      if (sizeBytes === null) throw missing();
      return { stream: createReadStream(pathOf(sha256)), sizeBytes };
    },
    localCopy: async (sha256) => {
      if ((await sizeOf(sha256)) === null) throw missing();
      return { path: pathOf(sha256), release: () => Promise.resolve() };
    },
    remove: (sha256) => rm(pathOf(sha256), { force: true }),
    listOlderThan: (timeMs) => listFiles(files, timeMs),
    freeBytes: async () => {
      await mkdir(root, { recursive: true });
      const found = await statfs(root);
      return found.bavail * found.bsize;
    },
    clearTemporary: async (olderThanMs) => {
      let removed = 0;
      for (const name of await readdir(incoming).catch(() => [])) {
        const found = await stat(path.join(incoming, name)).catch(() => null);
        if (found === null || found.mtimeMs >= olderThanMs) continue;
        await rm(path.join(incoming, name), { force: true, recursive: true });
        removed += 1;
      }
      return removed;
    },
  };
}

function missing(): AppError {
  return new AppError("internal", "The recorded file is not in the store any more. Upload it again.");
}

/** Rename, then make the renaming itself durable: a folder's entries are its own data to the disk. */
async function moveForGood(file: ReceivedFile, target: string, files: string): Promise<void> {
  const folder = path.dirname(target);
  const made = await mkdir(folder, { recursive: true });
  await rename(file.temporaryPath, target);
  await syncFolder(folder);
  if (made === undefined) return;
  await syncFolder(path.dirname(folder));
  await syncFolder(files);
  await syncFolder(path.dirname(files));
}

async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, "r");
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

async function* listFiles(folder: string, olderThanMs: number): AsyncIterable<string> {
  const directory = await opendir(folder, { recursive: true }).catch(() => null);
  if (directory === null) return;
  for await (const entry of directory) {
    if (!entry.isFile() || !SHA256.test(entry.name)) continue;
    const found = await stat(path.join(entry.parentPath, entry.name)).catch(() => null);
    if (found !== null && found.mtimeMs < olderThanMs) yield entry.name;
  }
}
