"use client";

import { useActionState, useCallback, useEffect, useMemo, useState, useSyncExternalStore } from "react";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { SubmitButton } from "@/components/ui/submit-button";
import type { DistanceUnit } from "@/lib/units/length";
import { DropArea } from "./drop-area";
import { FileChoice } from "./file-choice";
import { PlainResults } from "./plain-results";
import type { PlainUpload, UploadActions, UploadLimits, WaitingUpload } from "./upload-actions";
import { announcement, isBusy, sessionIdsOf, taggedOtherwise, type UploadItem } from "./upload-item";
import { queueOf } from "./queue-of";
import { SetupChoice, type SetupOption } from "./setup-choice";
import { UploadRow } from "./upload-row";

const NO_ITEMS: readonly UploadItem[] = [];
const NOTHING_SENT: PlainUpload = { problem: "", files: [] };

export type UploadPanelProps = {
  readonly riderId: string;
  readonly unit: DistanceUnit;
  readonly limits: UploadLimits;
  readonly setups: readonly SetupOption[];
  readonly lastUsedId: string | null;
  readonly waiting: readonly WaitingUpload[];
  readonly actions: UploadActions;
};

/** The upload page at work: take files, show each on its way, say what was ridden, lead on to the log. */
export function UploadPanel(props: UploadPanelProps) {
  const { riderId, unit, limits, setups, lastUsedId, waiting, actions } = props;
  const [setupId, setSetupId] = useState(lastUsedId);
  const [problem, setProblem] = useState("");
  const [plain, sendPlain] = useActionState(actions.sendPlain, NOTHING_SENT);
  const queue = useMemo(() => queueOf(riderId, limits, actions), [riderId, limits, actions]);
  const items = useSyncExternalStore(queue.subscribe, queue.items, () => NO_ITEMS);

  useEffect(() => {
    queue.ride(setupId);
  }, [queue, setupId]);
  useEffect(() => {
    queue.addStored(waiting);
  }, [queue, waiting]);
  useLeaveWarning(isBusy(items));

  const takeFiles = useCallback(
    (files: File[]) => {
      const left = queue.add(files);
      setProblem(files.length === 0 ? "No track was found in it." : tooMany(left, limits.filesMax));
    },
    [queue, limits],
  );
  const sessionIds = sessionIdsOf(items);
  const others = taggedOtherwise(items, setupId);

  const tagOthers = async () => {
    const result = await actions.tag(others, setupId);
    setProblem(result.ok ? "" : result.message);
    if (result.ok) queue.tagged(setupId);
  };
  const restore = async (key: string, sessionId: string) => {
    const result = await actions.restore(sessionId);
    setProblem(result.ok ? "" : result.message);
    if (result.ok) queue.readAgain(key);
  };

  return (
    <form
      action={sendPlain}
      className="lg:grid lg:grid-cols-[minmax(0,1fr)_20rem] lg:grid-rows-[auto_1fr] lg:gap-x-12"
    >
      <div className="lg:row-span-2">
        <DropArea onFiles={takeFiles}>
          <FileChoice onFiles={takeFiles} />
          <p id="upload-limits" className="text-muted mt-2 text-sm">
            up to {limits.filesMax} files, {Math.round(limits.bytesMax / 1_000_000)} MB each
            <span className="hidden sm:inline">; or drop them anywhere on this page</span>
          </p>
          <noscript>
            <div className="mt-3">
              <SubmitButton busyText="Sending">Send and read</SubmitButton>
              <p className="text-muted mt-1 text-sm">Without JavaScript: up to 2 MB in all.</p>
            </div>
          </noscript>
        </DropArea>
        {problem !== "" && (
          <Notice kind="problem" className="mt-4">
            {problem}
          </Notice>
        )}
        <p role="status" className="sr-only">
          {announcement(items)}
        </p>
        <PlainResults upload={plain} unit={unit} />
        {items.length > 0 && (
          <ul aria-label="Files" className="rule-ink mt-6">
            {items.map((item) => (
              <UploadRow
                key={item.key}
                item={item}
                unit={unit}
                actions={{
                  stop: (key) => queue.stop(key),
                  retry: (key) => queue.retry(key),
                  restore: (key, sessionId) => void restore(key, sessionId),
                }}
              />
            ))}
          </ul>
        )}
      </div>
      <SetupChoice
        setups={setups}
        lastUsedId={lastUsedId}
        chosenId={setupId}
        onChoose={setSetupId}
        others={others.length}
        onTagOthers={() => void tagOthers()}
      />
      {sessionIds.length > 0 && <GoOn sessionIds={sessionIds} />}
    </form>
  );
}

function tooMany(left: number, filesMax: number): string {
  if (left === 0) return "";
  return `Up to ${filesMax} files go at once, so ${left === 1 ? "1 file was" : `${left} files were`} left out. Add ${left === 1 ? "it" : "them"} when these are through.`;
}

/** Leads on; on a phone it stays within reach of the thumb. */
function GoOn({ sessionIds }: { sessionIds: readonly string[] }) {
  const [only] = sessionIds;
  return (
    <div className="bg-paper rule-ink sticky bottom-0 z-10 -mx-4 mt-8 px-4 py-3 sm:static sm:mx-0 sm:border-0 sm:px-0 lg:mt-2 lg:self-start">
      {sessionIds.length === 1 && only !== undefined ? (
        <LinkButton look="main" className="w-full sm:w-auto" href={`/sessions/${only}`}>
          Look at the session
        </LinkButton>
      ) : (
        <LinkButton look="main" className="w-full sm:w-auto" href="/sessions">
          Go to the {sessionIds.length} sessions
        </LinkButton>
      )}
    </div>
  );
}

/** The browser asks before it closes a page that is still sending. */
function useLeaveWarning(isOn: boolean): void {
  useEffect(() => {
    if (!isOn) return;
    const warn = (event: BeforeUnloadEvent) => {
      event.preventDefault();
    };
    window.addEventListener("beforeunload", warn);
    return () => {
      window.removeEventListener("beforeunload", warn);
    };
  }, [isOn]);
}
