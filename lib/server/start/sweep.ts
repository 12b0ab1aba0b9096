import type { Database } from "@/db/client";
import { sweepEmailTokens } from "@/lib/server/accounts/internal";
import { sweepSignIns } from "@/lib/server/auth/sign-ins";
import { logEvent } from "@/lib/server/context/log";
import { sweepOutbox } from "@/lib/server/mail/send-due";
import { purgeDeletedSessions } from "@/lib/server/sessions/delete-session";
import { sweepThrottle } from "@/lib/server/throttle/throttle";
import { sweepRefusedUploads } from "@/lib/server/uploads/sweep-files";

const EVERY_MS = 3_600_000;

/** Removes what has had its time: ended sign-ins, dead links, old counters and messages, deleted sessions. */
export async function sweep(db: Database, nowMs: number): Promise<void> {
  const signIns = await sweepSignIns(db, nowMs);
  const links = await sweepEmailTokens(db, nowMs);
  const counters = await sweepThrottle(db, nowMs);
  const messages = await sweepOutbox(db, nowMs);
  const sessions = await purgeDeletedSessions(db, nowMs);
  const refused = await sweepRefusedUploads(db, nowMs);
  logEvent("info", "swept", { signIns, links, counters, messages, sessions, refused });
}

/** Sweeps every hour from now on. Gives back how to stop. */
export function startSweeping(db: Database): () => void {
  const timer = setInterval(() => {
    sweep(db, Date.now()).catch((error: unknown) => {
      logEvent("error", "sweep_failed", { error: error instanceof Error ? error.message : String(error) });
    });
  }, EVERY_MS);
  timer.unref();
  return () => clearInterval(timer);
}
