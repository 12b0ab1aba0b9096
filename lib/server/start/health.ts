import { database } from "@/lib/server/context/database";
import { env } from "@/lib/server/env/env";
import { freeDiskMb, probeWrite } from "./checks";

/** `ok` when the server can do its work; `roomForUploads` is false when the disk is nearly full. */
export type Health = {
  readonly ok: boolean;
  readonly database: boolean;
  readonly storage: boolean;
  readonly roomForUploads: boolean;
};

const holds = (work: Promise<unknown>): Promise<boolean> =>
  work.then(
    () => true,
    () => false,
  );

/** What the database must answer: it can be read, and its durability settings are as they were at start. */
async function askDatabase(): Promise<void> {
  const { client } = database();
  await client.execute("SELECT 1 FROM user LIMIT 1");
  if (!env().databaseUrl.startsWith("file:")) return;
  const foreignKeys = (await client.execute("PRAGMA foreign_keys")).rows[0]?.[0];
  const synchronous = (await client.execute("PRAGMA synchronous")).rows[0]?.[0];
  if (foreignKeys !== 1 || synchronous !== 2) throw new Error("a database setting has changed");
}

/** Whether the database answers and storage can be written; never throws. */
export async function health(): Promise<Health> {
  const { dataDir, minFreeDiskMb } = env();
  const databaseOk = await holds(askDatabase());
  const storageOk = await holds(probeWrite(dataDir));
  const freeMb = await freeDiskMb(dataDir).catch(() => 0);
  return {
    ok: databaseOk && storageOk,
    database: databaseOk,
    storage: storageOk,
    roomForUploads: storageOk && freeMb >= minFreeDiskMb,
  };
}
