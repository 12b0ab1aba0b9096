import { deleteSessionAction } from "@/app/(app)/sessions/[sessionId]/actions";
import { RESTORE_DAYS } from "@/lib/server/sessions/delete-session";
import { DeleteForm } from "./delete-form";

/** The button that takes a session out of the log, with the way back stated beside it. */
export function DeleteSession({ sessionId }: { sessionId: string }) {
  return <DeleteForm act={deleteSessionAction} sessionId={sessionId} days={RESTORE_DAYS} />;
}
