import { readFile, stat } from "node:fs/promises";
import { env } from "@/lib/server/env/env";
import { type Archive, openArchive } from "./archive";
import { basemapArchivePath, basemapProgressPath } from "./archive-path";

const STALE_MS = 10 * 60_000;

type Opened = { readonly path: string; readonly archive: Promise<Archive | null> };

/** On globalThis, so that reloads of this module while developing do not open the archive again. */
const holder = globalThis as typeof globalThis & { trimwakeBasemap?: Opened };

/** The archive of land, opened once and kept; null while it is not there, then looked for again. */
export async function basemapArchive(): Promise<Archive | null> {
  const path = basemapArchivePath(env().dataDir);
  if (holder.trimwakeBasemap?.path !== path) {
    holder.trimwakeBasemap = { path, archive: openWhenThere(path) };
  }
  const archive = await holder.trimwakeBasemap.archive;
  if (archive === null) delete holder.trimwakeBasemap;
  return archive;
}

async function openWhenThere(path: string): Promise<Archive | null> {
  try {
    return await openArchive(path);
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
    throw error;
  }
}

/** The share of a running build that is done, 0 to 1, or null when none runs. */
export async function basemapBuildShare(nowMs: number): Promise<number | null> {
  const path = basemapProgressPath(env().dataDir);
  try {
    const [text, { mtimeMs }] = await Promise.all([readFile(path, "utf8"), stat(path)]);
    const share = Number(text.trim().split(" ")[1] ?? Number.NaN);
    return nowMs - mtimeMs < STALE_MS && share >= 0 && share <= 1 ? share : null;
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
    throw error;
  }
}
