import { waitingUploads } from "@/db/queries/upload";
import { requireUserId, type Context } from "@/lib/server/context/context";

/** Files of the asker that arrived whole but were never read, because the page was closed in between. */
export async function listWaitingUploads(
  ctx: Context,
): Promise<{ uploadId: string; fileName: string; sizeBytes: number }[]> {
  const rows = await waitingUploads(ctx.db.read, requireUserId(ctx));
  return rows.map(({ id, fileName, sizeBytes }) => ({ uploadId: id, fileName, sizeBytes }));
}
