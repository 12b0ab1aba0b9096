import { execFile } from "node:child_process";
import path from "node:path";
import { promisify } from "node:util";
import { diskStorage } from "@/lib/server/storage/disk-storage";
import { replaceStorage } from "@/lib/server/storage/storage";
import { replaceAnalysisPool } from "@/lib/server/uploads/analysis-pool";
import { createAnalysisPool, type AnalysisPool, type AnalysisPoolOptions } from "@/lib/worker/analysis-pool";

const ROOT = path.resolve(import.meta.dirname, "../..");

/** Bundles the worker as it stands into a folder and gives back its path. */
export async function bundledWorker(folder: string): Promise<string> {
  const outfile = path.join(folder, "analysis-worker.mjs");
  await promisify(execFile)(process.execPath, ["scripts/build-worker.mjs", outfile], { cwd: ROOT });
  return outfile;
}

/** A store of files and a worker pool of one test file, in its folder, in the place of the server's own. */
export async function useUploadServices(
  folder: string,
  options: Omit<AnalysisPoolOptions, "filename"> = {},
): Promise<{ pool: AnalysisPool; close: () => Promise<void> }> {
  const pool = createAnalysisPool({ threads: 1, ...options, filename: await bundledWorker(folder) });
  replaceAnalysisPool(pool);
  replaceStorage(diskStorage(folder));
  const close = async () => {
    replaceAnalysisPool(undefined);
    replaceStorage(undefined);
    await pool.close();
  };
  return { pool, close };
}
