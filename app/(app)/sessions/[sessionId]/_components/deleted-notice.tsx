import { PageHeader } from "@/components/ui/page-header";
import { restoreSessionAction } from "@/app/(app)/sessions/[sessionId]/actions";
import { formatDate, formatLongDate } from "@/lib/display/format-time";
import { RESTORE_DAYS } from "@/lib/server/sessions/delete-session";
import type { SessionDetail } from "@/lib/server/sessions/get-session";
import { RestoreForm } from "./restore-form";

const DAY_MS = 86_400_000;

/** The page of a deleted session: until when it can be brought back, and the button that does so. */
export function DeletedNotice({ session }: { session: SessionDetail }) {
  const { deletedAtMs, timeZone } = session;
  const untilMs = deletedAtMs === null ? null : deletedAtMs + RESTORE_DAYS * DAY_MS;
  return (
    <>
      <PageHeader title={session.title} subtitle={formatLongDate(session.startMs, timeZone)} />
      <RestoreForm act={restoreSessionAction} sessionId={session.id}>
        It is out of your log and out of every comparison, and can be brought back until{" "}
        {formatDate(untilMs, timeZone)}. After that it is gone for good.
      </RestoreForm>
    </>
  );
}
