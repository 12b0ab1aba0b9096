import { openDatabase, type Database } from "@/db/client";
import { env } from "@/lib/server/env/env";
import { logEvent } from "./log";

const holder = globalThis as typeof globalThis & { trimwakeDatabase?: Database };

/** How the process says that it ended because the database was jammed (sysexits.h, EX_TEMPFAIL: try again). */
const EXIT_BUSY = 75;

/** Whether an error, or what caused it, says that another writer holds the file. */
export function isBusyError(error: unknown): boolean {
  for (let cause: unknown = error; cause instanceof Error; cause = cause.cause) {
    if ("code" in cause && typeof cause.code === "string" && /^SQLITE_(BUSY|LOCKED)/.test(cause.code))
      return true;
  }
  return false;
}

/**
 * With one queue for all writes the file is never busy. If it is, a second process has it open or the queue was
 * bypassed, and this process can stay jammed: it ends, and whoever keeps it running starts it afresh.
 */
export function endWhenBusy(db: Database, end: (code: number) => void): Database {
  return {
    ...db,
    write: async (work) => {
      try {
        return await db.write(work);
      } catch (error) {
        if (isBusyError(error)) {
          logEvent("error", "database_busy", { error: error instanceof Error ? error.message : "" });
          end(EXIT_BUSY);
        }
        throw error;
      }
    },
  };
}

/** The one database handle of this process, opened at first use (never while building). */
export function database(): Database {
  holder.trimwakeDatabase ??= endWhenBusy(openDatabase(env().databaseUrl), (code) => process.exit(code));
  return holder.trimwakeDatabase;
}
