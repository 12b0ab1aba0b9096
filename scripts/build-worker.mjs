// Bundles the analysis worker, by default to build/, from where the pool loads it by path.
import path from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const root = path.resolve(import.meta.dirname, "..");

/** Bundles the worker into one file and gives back its path. */
export async function buildWorker(outfile = path.join(root, "build/analysis-worker.mjs")) {
  await build({
    absWorkingDir: root,
    entryPoints: ["lib/worker/analysis-worker.ts"],
    outfile,
    bundle: true,
    platform: "node",
    format: "esm",
    target: "node20",
    sourcemap: "linked",
    // Names in stack traces; the rest is never read by people.
    keepNames: true,
    logLevel: "warning",
    banner: {
      js: 'import { createRequire } from "node:module"; const require = createRequire(import.meta.url);',
    },
  });
  return outfile;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await buildWorker();
