import { headers } from "next/headers";
import type { AppError } from "@/lib/errors/app-error";
import { readActor } from "@/lib/server/auth/read-actor";
import { logEvent } from "@/lib/server/context/log";

/** One line for what was refused: who asked (null: nobody signed in) and where, as far as the request tells. */
export async function logDenial(error: AppError): Promise<void> {
  const { code, message } = error;
  logEvent("warn", "denied", { code, message, ...(await requester()) });
}

async function requester(): Promise<{ userId: string | null; path: string | null } | null> {
  try {
    const path = (await headers()).get("x-path")?.split("?")[0] ?? null;
    const actor = await readActor();
    return { userId: actor.kind === "user" ? actor.userId : null, path };
  } catch {
    // Not in a request (a test, a command), or the database does not answer: the refusal stands all the same.
    return null;
  }
}
