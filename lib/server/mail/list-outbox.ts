import { desc } from "drizzle-orm";
import { outbox } from "@/db/schema/outbox";
import { AppError } from "@/lib/errors/app-error";
import type { Context } from "@/lib/server/context/context";
import { env, type Env } from "@/lib/server/env/env";

export type OutboxMessage = {
  readonly id: string;
  readonly recipient: string;
  readonly subject: string;
  readonly body: string;
  readonly sent: boolean;
  readonly createdAtMs: number;
};

/** The outbox holds links that open accounts: only a developer's machine and the demo show it. */
export function isOutboxOpen(settings: Pick<Env, "mode" | "demo">): boolean {
  return settings.demo || settings.mode === "development";
}

/**
 * The newest messages, for developers and the demo.
 *
 * @throws AppError `not_found` anywhere else.
 */
export async function listOutbox(
  ctx: Context,
  settings: Pick<Env, "mode" | "demo"> = env(),
): Promise<OutboxMessage[]> {
  if (!isOutboxOpen(settings)) throw new AppError("not_found", "This page is not here.");
  const rows = await ctx.db.read
    .select()
    .from(outbox)
    .orderBy(desc(outbox.createdAtMs), desc(outbox.id))
    .limit(50);
  return rows.map((row) => ({
    id: row.id,
    recipient: row.recipient,
    subject: row.subject,
    body: row.body,
    sent: row.sentAtMs !== null,
    createdAtMs: row.createdAtMs,
  }));
}
