import { storage } from "@/lib/server/storage/storage";
import type { AnalysisProgress, AnalysisTask, TrackOutcome } from "@/lib/worker/analysis-task";
import { analysisPool } from "./analysis-pool";

/** Reads and analyses a stored file in the worker pool. */
export async function analyseStored(
  file: { readonly sha256: string; readonly fileName: string },
  options: Omit<AnalysisTask, "path" | "fileName">,
  onProgress?: (progress: AnalysisProgress) => void,
): Promise<TrackOutcome[]> {
  const copy = await storage().localCopy(file.sha256);
  try {
    return await analysisPool().run({ path: copy.path, fileName: file.fileName, ...options }, onProgress);
  } finally {
    await copy.release();
  }
}
