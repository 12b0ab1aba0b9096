import type { Transaction } from "@/db/client";
import { newId } from "@/db/new-id";
import { outbox } from "@/db/schema/outbox";
import type { Message } from "./messages";

/** Puts a message on its way, in the transaction of what caused it: no change without its message, none twice. */
export async function queueMail(
  tx: Transaction,
  mail: { to: string; message: Message; nowMs: number },
): Promise<void> {
  await tx.insert(outbox).values({
    id: newId(),
    recipient: mail.to,
    subject: mail.message.subject,
    body: mail.message.body,
    createdAtMs: mail.nowMs,
  });
}
