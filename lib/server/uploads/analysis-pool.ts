import path from "node:path";
import { createAnalysisPool, type AnalysisPool } from "@/lib/worker/analysis-pool";

const holder = globalThis as typeof globalThis & { trimwakeAnalysisPool?: AnalysisPool };

/** The one pool of this process, made at first use; its worker is bundled before the server is built or started. */
export function analysisPool(): AnalysisPool {
  holder.trimwakeAnalysisPool ??= createAnalysisPool({
    filename: path.join(/* turbopackIgnore: true */ process.cwd(), "build", "analysis-worker.mjs"),
  });
  return holder.trimwakeAnalysisPool;
}

/** Puts another pool in its place (tests, commands). */
export function replaceAnalysisPool(next: AnalysisPool | undefined): void {
  holder.trimwakeAnalysisPool = next;
}
