import type { Transaction } from "@/db/client";
import { newId } from "@/db/new-id";
import { auditLog } from "@/db/schema/audit-log";
import type { Context } from "@/lib/server/context/context";

/** Writes who did what, in the transaction of the change itself. Never put secrets into `detail`. */
export async function audit(
  tx: Transaction,
  ctx: Context,
  entry: { action: string; subjectKind: string; subjectId: string; detail?: Record<string, unknown> },
): Promise<void> {
  const actorId = ctx.actor.kind === "user" ? ctx.actor.userId : ctx.actor.kind;
  await tx.insert(auditLog).values({
    id: newId(),
    actorId,
    action: entry.action,
    subjectKind: entry.subjectKind,
    subjectId: entry.subjectId,
    detail: entry.detail ?? {},
    createdAtMs: ctx.nowMs(),
  });
}
