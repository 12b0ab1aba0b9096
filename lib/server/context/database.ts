import { openDatabase, type Database } from "@/db/client";
import { env } from "@/lib/server/env/env";

const holder = globalThis as typeof globalThis & { trimwakeDatabase?: Database };

/** The one database handle of this process, opened at first use (never while building). */
export function database(): Database {
  holder.trimwakeDatabase ??= openDatabase(env().databaseUrl);
  return holder.trimwakeDatabase;
}
