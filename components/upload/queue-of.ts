import { sendFile } from "./send-file";
import type { UploadActions, UploadLimits } from "./upload-actions";
import { UploadQueue } from "./upload-queue";

const SENDING_AT_ONCE = 2;

let kept: { readonly riderId: string; readonly queue: UploadQueue } | null = null;

/**
 * The queue of the rider at the screen. In a browser it stays while they walk through the app; another rider gets a new
 * one. On the server each rendering gets its own, so that nothing is shared between requests.
 */
export function queueOf(riderId: string, limits: UploadLimits, actions: UploadActions): UploadQueue {
  if (kept?.riderId === riderId) return kept.queue;
  const queue = new UploadQueue(
    { send: sendFile, importFile: actions.importFile },
    { ...limits, sendingAtOnce: SENDING_AT_ONCE },
  );
  if (typeof window !== "undefined") kept = { riderId, queue };
  return queue;
}
