// Bundles the analysis worker to build/, from where the pool loads it by path.
import { existsSync } from "node:fs";
import { build } from "esbuild";

const entry = "lib/worker/analysis-worker.ts";
if (existsSync(entry)) {
  await build({
    entryPoints: [entry],
    outfile: "build/analysis-worker.mjs",
    bundle: true,
    platform: "node",
    format: "esm",
    target: "node20",
    sourcemap: "inline",
    logLevel: "warning",
    banner: {
      js: 'import { createRequire } from "node:module"; const require = createRequire(import.meta.url);',
    },
  });
}
