import { env } from "@/lib/server/env/env";
import { diskStorage } from "./disk-storage";
import type { FileStorage } from "./file-storage";

let current: FileStorage | undefined;

/** The store of raw files. It holds no state of its own, so any number of copies of this module may have one. */
export function storage(): FileStorage {
  current ??= diskStorage(env().dataDir);
  return current;
}

/** Puts another store in its place (tests); undefined goes back to the usual one. */
export function replaceStorage(next: FileStorage | undefined): void {
  current = next;
}
