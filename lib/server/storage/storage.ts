import { env } from "@/lib/server/env/env";
import { diskStorage } from "./disk-storage";
import type { FileStorage } from "./file-storage";

const holder = globalThis as typeof globalThis & { trimwakeStorage?: FileStorage };

/** The one store of raw files of this process. */
export function storage(): FileStorage {
  holder.trimwakeStorage ??= diskStorage(env().dataDir);
  return holder.trimwakeStorage;
}

/** Puts another store in its place (tests). Gives back the one before. */
export function replaceStorage(next: FileStorage | undefined): FileStorage | undefined {
  const before = holder.trimwakeStorage;
  holder.trimwakeStorage = next;
  return before;
}
