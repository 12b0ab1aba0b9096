import { AppError } from "@/lib/errors/app-error";
import { storage } from "@/lib/server/storage/storage";
import type { AnalysisProgress, AnalysisTask, TrackOutcome } from "@/lib/worker/analysis-task";
import { POOL_BUSY } from "@/lib/worker/analysis-pool";
import { analysisPool } from "./analysis-pool";

/** Files of one owner in the pool at once: three tabs and a correction. Nobody's files may fill it for everybody. */
export const PER_OWNER_MAX = 4;

/** Lives on globalThis, as the pool does: pages, routes and actions have copies of this module. */
const holder = globalThis as typeof globalThis & { trimwakeReading?: Map<string, number> };

const busy = (what: string, cause?: unknown) =>
  new AppError("limit_exceeded", `${what} This one is safe; read it in a minute.`, { cause });

/**
 * Reads and analyses a stored file in the worker pool.
 *
 * @throws AppError `limit_exceeded` when too many files wait already, of everybody or of this owner.
 */
export async function analyseStored(
  file: { readonly ownerId: string; readonly sha256: string; readonly fileName: string },
  options: Omit<AnalysisTask, "path" | "fileName">,
  onProgress?: (progress: AnalysisProgress) => void,
): Promise<TrackOutcome[]> {
  holder.trimwakeReading ??= new Map();
  const reading = holder.trimwakeReading;
  const { ownerId } = file;
  const before = reading.get(ownerId) ?? 0;
  if (before >= PER_OWNER_MAX) throw busy(`${PER_OWNER_MAX} of your files are being read just now.`);
  reading.set(ownerId, before + 1);
  try {
    return await analyseInPool(file, options, onProgress);
  } finally {
    const left = (reading.get(ownerId) ?? 1) - 1;
    if (left > 0) reading.set(ownerId, left);
    else reading.delete(ownerId);
  }
}

async function analyseInPool(
  file: { readonly sha256: string; readonly fileName: string },
  options: Omit<AnalysisTask, "path" | "fileName">,
  onProgress?: (progress: AnalysisProgress) => void,
): Promise<TrackOutcome[]> {
  const copy = await storage().localCopy(file.sha256);
  try {
    return await analysisPool().run({ path: copy.path, fileName: file.fileName, ...options }, onProgress);
  } catch (error) {
    if (!(error instanceof Error && "code" in error && error.code === POOL_BUSY)) throw error;
    throw busy("Many files are being read just now.", error);
  } finally {
    await copy.release();
  }
}
