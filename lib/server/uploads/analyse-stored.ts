import { AppError } from "@/lib/errors/app-error";
import { storage } from "@/lib/server/storage/storage";
import type { AnalysisProgress, AnalysisTask, TrackOutcome } from "@/lib/worker/analysis-task";
import { POOL_BUSY } from "@/lib/worker/analysis-pool";
import { analysisPool } from "./analysis-pool";

/**
 * Reads and analyses a stored file in the worker pool.
 *
 * @throws AppError `limit_exceeded` when too many files wait already.
 */
export async function analyseStored(
  file: { readonly sha256: string; readonly fileName: string },
  options: Omit<AnalysisTask, "path" | "fileName">,
  onProgress?: (progress: AnalysisProgress) => void,
): Promise<TrackOutcome[]> {
  const copy = await storage().localCopy(file.sha256);
  try {
    return await analysisPool().run({ path: copy.path, fileName: file.fileName, ...options }, onProgress);
  } catch (error) {
    if (!(error instanceof Error && "code" in error && error.code === POOL_BUSY)) throw error;
    throw new AppError(
      "limit_exceeded",
      "Many files are being read just now. This one is safe; read it in a minute.",
      { cause: error },
    );
  } finally {
    await copy.release();
  }
}
