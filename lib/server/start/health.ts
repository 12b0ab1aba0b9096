import { access, constants, statfs } from "node:fs/promises";
import { database } from "@/lib/server/context/database";
import { env } from "@/lib/server/env/env";

/** Whether the database answers and storage can be written; never throws. */
export async function health(): Promise<{ ok: boolean; database: boolean; storage: boolean }> {
  const databaseOk = await database()
    .client.execute("SELECT 1")
    .then(
      () => true,
      () => false,
    );
  const storageOk = await Promise.all([access(env().dataDir, constants.W_OK), statfs(env().dataDir)]).then(
    () => true,
    () => false,
  );
  return { ok: databaseOk && storageOk, database: databaseOk, storage: storageOk };
}
