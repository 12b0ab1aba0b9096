// npm run demo: from a fresh clone to a running, seeded Trimwake. Safe to run again; later runs start in seconds.
import path from "node:path";
import process from "node:process";
import {
  bin,
  ensureBuilt,
  ensureInstalled,
  portFromEnv,
  requireNode,
  root,
  run,
  say,
  serve,
  start,
} from "./support/steps.mjs";

requireNode();
const port = portFromEnv();
const dataDir = path.resolve(root, process.env.DATA_DIR ?? "data/demo");
const env = { DATA_DIR: dataDir, TRIMWAKE_DEMO: "1", APP_ORIGIN: `http://localhost:${port}` };

ensureInstalled();
if (!ensureBuilt()) {
  say("The build failed; see above.");
  process.exit(1);
}
if (run(process.execPath, [bin("tsx"), "scripts/seed-demo.ts"], { env }) !== 0) {
  say("The demo data could not be made; see above.");
  process.exit(1);
}
const basemap = start(process.execPath, [bin("tsx"), "scripts/build-basemap.ts"], { env });
await serve({
  port,
  env,
  others: [basemap],
  ready: () => run(process.execPath, [bin("tsx"), "scripts/seed-demo.ts", "--accounts"], { env }),
});
