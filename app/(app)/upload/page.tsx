import type { Metadata } from "next";
import { CAUTIONS } from "@/components/shell/cautions";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { UploadPanel } from "@/components/upload/upload-panel";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requireUser } from "@/lib/server/auth/current-user";
import { lastUsedSetup, listSetups } from "@/lib/server/gear/read-gear";
import { listWaitingUploads } from "@/lib/server/uploads/list-waiting-uploads";
import { FILE_BYTES_MAX, FILES_AT_ONCE_MAX } from "@/lib/server/uploads/upload-limits";
import { importFileAction, restoreSessionAction, sendPlainAction, tagSessionsAction } from "./actions";

export const metadata: Metadata = { title: "Upload tracks" };

const LIMITS = { filesMax: FILES_AT_ONCE_MAX, bytesMax: FILE_BYTES_MAX };
const ACTIONS = {
  importFile: importFileAction,
  restore: restoreSessionAction,
  tag: tagSessionsAction,
  sendPlain: sendPlainAction,
};

export default async function UploadPage() {
  const user = await requireUser("/upload");
  const ctx = await requestContext();
  const [setups, last, waiting] = await pageRead("/upload", () =>
    Promise.all([listSetups(ctx), lastUsedSetup(ctx), listWaitingUploads(ctx)]),
  );
  return (
    <>
      <PageHeader
        title="Upload tracks"
        subtitle="GPX, TCX, KML or FIT, plain or gzip-compressed, or a zip of them."
      />
      <UploadPanel
        riderId={user.id}
        unit={user.units.distance}
        limits={LIMITS}
        setups={setups
          .filter(({ retiredAtMs }) => retiredAtMs === null)
          .map(({ id, name }) => ({ id, name }))}
        lastUsedId={last?.id ?? null}
        waiting={waiting}
        actions={ACTIONS}
      />
      <Notice kind="caution" className="mt-10 max-w-prose text-sm">
        <p>{CAUTIONS.water}</p>
        <p className="mt-2">{CAUTIONS.speed}</p>
      </Notice>
    </>
  );
}
