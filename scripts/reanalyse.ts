// Works every session out again that an older analysis made, from its raw file. The server must be stopped: one process opens
// the database file at a time.
import { existsSync } from "node:fs";
import process from "node:process";
import { prepareDatabase } from "@/db/client";
import { newId } from "@/db/new-id";
import { database } from "@/lib/server/context/database";
import { env } from "@/lib/server/env/env";
import { reanalyseOldSessions } from "@/lib/server/sessions/reanalyse-old-sessions";
import { analysisPool } from "@/lib/server/uploads/analysis-pool";

const settings = env();

const isServed = await fetch(`http://localhost:${settings.port}/api/health`).then(
  () => true,
  () => false,
);
if (isServed) {
  process.stderr.write(`A server answers on port ${settings.port}. Stop it first, then run this again.\n`);
  process.exit(1);
}

if (settings.databaseUrl.startsWith("file:") && !existsSync(settings.databaseUrl.slice("file:".length))) {
  process.stderr.write(
    `There is no database in ${settings.dataDir}. Set DATA_DIR to the folder the server uses.\n`,
  );
  process.exit(1);
}

const db = database();
await prepareDatabase(db, settings.databaseUrl);
const ctx = {
  db,
  actor: { kind: "system" as const },
  nowMs: () => Date.now(),
  requestId: newId(),
  address: null,
};
const { done, failed } = await reanalyseOldSessions(ctx, ({ sessionId, problem }) => {
  process.stdout.write(`${sessionId} ${problem ?? "done"}\n`);
});
process.stdout.write(`${done} worked out again, ${failed} failed.\n`);
await analysisPool().close();
await db.close();
process.exitCode = failed > 0 ? 1 : 0;
