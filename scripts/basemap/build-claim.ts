import { open, readFile, rm, stat } from "node:fs/promises";

/** A living builder writes its progress every few seconds; after this long its number belongs to another. */
const STALE_MS = 10 * 60_000;

export type BuildClaim = {
  /** What the progress file says: the builder's process id and the share done, 0 to 1. */
  text(share: number): string;
  release(): Promise<void>;
};

/**
 * Makes this process the only builder by creating the progress file; null when a living process holds it.
 * A file whose process has gone is taken over.
 */
export async function claimBuild(progressFile: string, pid = process.pid): Promise<BuildClaim | null> {
  const text = (share: number) => `${pid} ${share.toFixed(3)}\n`;
  for (let attempt = 0; attempt < 2; attempt += 1) {
    try {
      const file = await open(progressFile, "wx");
      await file.write(text(0));
      await file.close();
      return { text, release: () => rm(progressFile, { force: true }) };
    } catch (error) {
      if (!(error instanceof Error && "code" in error && error.code === "EEXIST")) throw error;
      if (await heldByLiving(progressFile)) return null;
      await rm(progressFile, { force: true });
    }
  }
  return null;
}

async function heldByLiving(progressFile: string): Promise<boolean> {
  const holder = Number.parseInt(await readFile(progressFile, "utf8").catch(() => ""), 10);
  if (!Number.isInteger(holder) || holder <= 0) return false;
  const written = await stat(progressFile).catch(() => null);
  if (written === null || Date.now() - written.mtimeMs > STALE_MS) return false;
  try {
    process.kill(holder, 0);
    return true;
  } catch (error) {
    // EPERM: alive, and somebody else's.
    return error instanceof Error && "code" in error && error.code === "EPERM";
  }
}
