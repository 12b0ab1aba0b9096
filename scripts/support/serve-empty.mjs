// Serves the built app on an emptied data folder, for the browser tests.
import { rmSync } from "node:fs";
import process from "node:process";
import { portFromEnv, say, serve } from "./steps.mjs";

const dataDir = process.env.DATA_DIR;
if (dataDir === undefined || !dataDir.includes("test-results")) {
  say("DATA_DIR must lie under test-results: it is emptied first.");
  process.exit(1);
}
rmSync(dataDir, { recursive: true, force: true });
await serve({ port: portFromEnv(), env: { DATA_DIR: dataDir }, ready: () => say("ready"), ownGroup: false });
