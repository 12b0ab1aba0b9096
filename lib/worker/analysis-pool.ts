import { setTimeout as later } from "node:timers";
import { MessageChannel } from "node:worker_threads";
import { Piscina } from "piscina";
import type { ParseErrorCode } from "@/lib/errors/parse-error";
import { refusal } from "@/lib/formats/refusal";
import type { AnalysisProgress, AnalysisTask, TrackOutcome, WorkerMessage } from "./analysis-task";

/** A code and no class: the pool outlives the copy of the module that made it, and classes of two copies differ. */
export const POOL_BUSY = "ERR_ANALYSIS_POOL_BUSY";

export type AnalysisPoolOptions = {
  /** The bundle that scripts/build-worker.mjs makes. */
  readonly filename: string;
  readonly threads?: number;
  readonly timeLimitMs?: number;
  readonly heapMbMax?: number;
  readonly queueMax?: number;
};

export type AnalysisPool = {
  /**
   * Reads and analyses one file in a worker thread. A file that takes too long or needs too much memory is a refusal with its
   * sentence like any other: its worker is ended, a fresh one takes its place, this process goes on.
   *
   * @throws Error with code POOL_BUSY when too many files wait already; whatever the code itself throws.
   */
  readonly run: (
    task: AnalysisTask,
    onProgress?: (progress: AnalysisProgress) => void,
  ) => Promise<TrackOutcome[]>;
  readonly close: () => Promise<void>;
};

const DEFAULTS = { threads: 2, timeLimitMs: 60_000, heapMbMax: 512, queueMax: 200 };

/** Makes a pool of worker threads; threads start with the first files and end when there is nothing to do. */
export function createAnalysisPool(options: AnalysisPoolOptions): AnalysisPool {
  const limits = { ...DEFAULTS, ...options };
  const piscina = new Piscina<WorkerMessage, TrackOutcome[]>({
    filename: limits.filename,
    minThreads: 0,
    maxThreads: limits.threads,
    idleTimeout: 30_000,
    resourceLimits: { maxOldGenerationSizeMb: limits.heapMbMax, maxYoungGenerationSizeMb: 32 },
    // A reader of strangers' files gets none of the server's settings.
    env: {},
    execArgv: [],
  });
  let open = 0;
  const run: AnalysisPool["run"] = async (task, onProgress) => {
    if (open >= limits.threads + limits.queueMax) {
      throw Object.assign(new Error("too many files wait to be read"), { code: POOL_BUSY });
    }
    open += 1;
    try {
      return await runTask(piscina, task, { timeLimitMs: limits.timeLimitMs, onProgress });
    } finally {
      open -= 1;
    }
  };
  return { run, close: () => piscina.destroy() };
}

async function runTask(
  piscina: Piscina<WorkerMessage, TrackOutcome[]>,
  task: AnalysisTask,
  options: { timeLimitMs: number; onProgress: ((progress: AnalysisProgress) => void) | undefined },
): Promise<TrackOutcome[]> {
  const { port1, port2 } = new MessageChannel();
  const stop = new AbortController();
  let timer: NodeJS.Timeout | undefined;
  // The clock runs from the worker's first word on: waiting for a free thread is nobody's fault.
  port1.on("message", (progress: AnalysisProgress) => {
    timer ??= later(() => {
      stop.abort();
    }, options.timeLimitMs);
    options.onProgress?.(progress);
  });
  try {
    return await piscina.run({ task, progress: port2 }, { transferList: [port2], signal: stop.signal });
  } catch (error) {
    if (stop.signal.aborted) return [refused("took_too_long")];
    if (codeOf(error) === "ERR_WORKER_OUT_OF_MEMORY") return [refused("out_of_memory")];
    throw error;
  } finally {
    clearTimeout(timer);
    port1.close();
  }
}

function codeOf(error: unknown): unknown {
  return error instanceof Error && "code" in error ? error.code : null;
}

function refused(code: ParseErrorCode): TrackOutcome {
  return { kind: "refused", entryName: "", code, text: refusal(code).message };
}
