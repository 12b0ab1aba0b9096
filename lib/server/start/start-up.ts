import { prepareDatabase, type Database } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { database } from "@/lib/server/context/database";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { smtpSend, startSender } from "@/lib/server/mail/sender";
import { sweepOrphans } from "@/lib/server/uploads/sweep-files";
import { backUpBeforeMigration } from "./backup";
import { checkDatabase, freeDiskMb, probeWrite } from "./checks";
import { keepPrivate } from "./private-files";
import { startSweeping, sweep } from "./sweep";

const holder = globalThis as typeof globalThis & { trimwakeStopTasks?: () => void };

/**
 * What a server does before its first request: read the settings, make the data folder and try to write there,
 * bring the database to the newest schema (with a copy first), assert that it is whole and durable, clear away
 * what is over, and start the mail. It stops the process rather than serve on a broken base.
 */
export async function startUp(): Promise<void> {
  const settings = env();
  const { dataDir, databaseUrl } = settings;
  await keepPrivate(databaseUrl, dataDir);
  await probeWrite(dataDir);
  const db = database();
  await prepareDatabase(db, databaseUrl);
  if (databaseUrl.startsWith("file:")) {
    await backUpBeforeMigration(db, { root: process.cwd(), dataDir, nowMs: Date.now() });
  }
  await migrateDatabase(db, process.cwd());
  const version = databaseUrl.startsWith("file:") ? (await checkDatabase(db)).version : null;
  await sweep(db, Date.now());
  sweepFilesAside(db);
  startTasks();
  closeAtTheEnd();
  const freeMb = await freeDiskMb(dataDir);
  if (freeMb < settings.minFreeDiskMb) logEvent("warn", "disk_nearly_full", { freeMb });
  if (settings.origin.startsWith("https:") && settings.trustedProxyHops === 0) {
    logEvent("warn", "no_client_addresses", {
      why: "TRUSTED_PROXY_HOPS is 0 behind https: tries are counted by account only, not by where they come from",
    });
  }
  logEvent("info", "started", { demo: settings.demo, mode: settings.mode, sqlite: version, freeMb });
}

/** Looking at every stored file takes seconds on a large store; requests need not wait for it. */
function sweepFilesAside(db: Database): void {
  sweepOrphans(db, Date.now()).then(
    (swept) => logEvent("info", "files_swept", swept),
    (error: unknown) => logEvent("error", "files_sweep_failed", { error: String(error) }),
  );
}

/** Starts what runs beside the requests; a development server that starts again stops its old ones first. */
function startTasks(): void {
  const { demo, mode, smtpUrl, mailFrom } = env();
  holder.trimwakeStopTasks?.();
  const stops = [startSweeping(database())];
  if (smtpUrl !== null) stops.push(startSender(database(), smtpSend(smtpUrl, mailFrom)));
  else if (mode === "production" && !demo) {
    logEvent("warn", "no_mail", {
      why: "SMTP_URL is not set: messages stay in the outbox and nobody gets them",
    });
  }
  holder.trimwakeStopTasks = () => stops.forEach((stop) => stop());
}

/**
 * Next answers SIGTERM and SIGINT itself: it lets the requests under way finish and exits. What is left to do is to
 * stop the tasks and close the file. Committed rows may stand in its write-ahead log; the next start reads them
 * there, after a kill as well.
 */
function closeAtTheEnd(): void {
  process.once("exit", () => {
    holder.trimwakeStopTasks?.();
    database().client.close();
  });
}
