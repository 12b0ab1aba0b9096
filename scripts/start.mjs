// npm start: serves production with real data, no seed. Settings: .env.example.
import path from "node:path";
import process from "node:process";
import { existsSync } from "node:fs";
import {
  bin,
  ensureBuilt,
  ensureInstalled,
  portFromEnv,
  requireFreePort,
  requireNode,
  root,
  say,
  serve,
  start,
} from "./support/steps.mjs";

requireNode();
const settings = path.join(root, ".env");
if (existsSync(settings)) process.loadEnvFile(settings);
const port = portFromEnv();
await requireFreePort(port);
ensureInstalled();
if (!ensureBuilt()) {
  say("The build failed; see above.");
  process.exit(1);
}
const dataDir = path.resolve(root, process.env.DATA_DIR ?? "data");
const env = { DATA_DIR: dataDir };
const basemap = start(process.execPath, [bin("tsx"), "scripts/build-basemap.ts"], { env });
await serve({ port, env, others: [basemap], ready: () => say(`Trimwake is on http://localhost:${port}`) });
