import { mkdir } from "node:fs/promises";
import { migrateDatabase } from "@/db/migrate";
import { prepareDatabase } from "@/db/client";
import { database } from "@/lib/server/context/database";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";

/**
 * What a server does before its first request: read the settings, make the data folder, bring the database to
 * the newest schema, assert its durability settings. It stops the process rather than serve on a broken base.
 */
export async function startUp(): Promise<void> {
  const settings = env();
  await mkdir(settings.dataDir, { recursive: true });
  await prepareDatabase(database(), settings.databaseUrl);
  await migrateDatabase(database(), process.cwd());
  logEvent("info", "started", { demo: settings.demo, mode: settings.mode });
}
