// npm run demo: from a fresh clone to a running, seeded Trimwake. Safe to run again; later runs start in seconds.
import { existsSync, readFileSync } from "node:fs";
import path from "node:path";
import process from "node:process";
import {
  bin,
  ensureBuilt,
  ensureInstalled,
  portFromEnv,
  requireFreePort,
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

await requireFreePort(port);
ensureInstalled();
if (!ensureBuilt()) {
  say("The build failed; see above.");
  process.exit(1);
}
function season() {
  const file = path.join(dataDir, "demo-season.json");
  return existsSync(file) ? JSON.parse(readFileSync(file, "utf8")) : { state: "none" };
}

function printAccounts() {
  say(`\nTrimwake is on http://localhost:${port}\n\nDemo accounts (all invented):`);
  for (const { email, password, name, role } of season().accounts) {
    say(`  ${email.padEnd(24)} ${password}   ${name}, ${role.toLowerCase()}`);
  }
  say("\nCtrl-C ends it.");
}

if (season().state !== "done" && run(process.execPath, [bin("tsx"), "scripts/seed-demo.ts"], { env }) !== 0) {
  say("The demo data could not be made; see above.");
  process.exit(1);
}
const basemap = start(process.execPath, [bin("tsx"), "scripts/build-basemap.ts"], { env });
await serve({
  port,
  env,
  others: [basemap],
  ready: printAccounts,
});
