// Bundles the analysis worker to build/, from where the pool loads it by path, or to the file named as argument.
import path from "node:path";
import { build } from "esbuild";

const root = path.resolve(import.meta.dirname, "..");

await build({
  absWorkingDir: root,
  entryPoints: ["lib/worker/analysis-worker.ts"],
  outfile: process.argv[2] ?? path.join(root, "build/analysis-worker.mjs"),
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
