import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { Progress } from "@/components/ui/progress";
import { classNames } from "@/lib/display/class-names";
import type { DistanceUnit } from "@/lib/units/length";
import type { UploadItem } from "./upload-item";
import { VerdictLine, verdictStatus } from "./verdict-line";

export type RowActions = {
  readonly stop: (key: string) => void;
  readonly retry: (key: string) => void;
  readonly restore: (key: string, sessionId: string) => void;
};

/** One file of the list: its name, where it is on its way, and what came of it. */
export function UploadRow({
  item,
  unit,
  actions,
}: {
  item: UploadItem;
  unit: DistanceUnit;
  actions: RowActions;
}) {
  const { key, name, state } = item;
  const isProblem = state.step === "failed" || statusWord(item) === "not read";
  return (
    <li className="rule-hair py-3">
      <div className="flex items-baseline justify-between gap-4">
        <p className="min-w-0 font-semibold break-words">{name}</p>
        <div className="flex shrink-0 items-baseline gap-4">
          <p className={classNames("num text-sm", isProblem && "text-buoy-text")}>{statusWord(item)}</p>
          {(state.step === "waiting" || state.step === "sending") && (
            <Button look="quiet" size="small" onClick={() => actions.stop(key)}>
              Stop <span className="sr-only">sending {name}</span>
            </Button>
          )}
        </div>
      </div>
      {state.step === "sending" && (
        <Progress label={`Sending ${name}`} share={state.share} className="mt-2" />
      )}
      {state.step === "reading" && <Progress label={`Reading ${name}`} share={null} className="mt-2" />}
      {state.step === "failed" && <p className="text-muted mt-1 text-sm">{state.text}</p>}
      {state.step === "done" &&
        state.verdicts.map((verdict) => (
          <VerdictLine
            key={`${verdict.entryName}-${verdict.kind}`}
            verdict={verdict}
            unit={unit}
            isArchive={state.verdicts.length > 1 || verdict.entryName !== ""}
            onRestore={(sessionId) => {
              actions.restore(key, sessionId);
            }}
          />
        ))}
      <RowButtons item={item} actions={actions} />
    </li>
  );
}

function RowButtons({ item, actions }: { item: UploadItem; actions: RowActions }) {
  const { key, name, state } = item;
  if (state.step === "failed" && state.signedOut) {
    return (
      <LinkButton look="quiet" size="small" className="mt-2" href="/sign-in?next=/upload">
        Sign in again
      </LinkButton>
    );
  }
  if (state.step === "stopped" || (state.step === "failed" && state.again)) {
    return (
      <Button look="quiet" size="small" className="mt-2" onClick={() => actions.retry(key)}>
        Try again <span className="sr-only">with {name}</span>
      </Button>
    );
  }
  return null;
}

function statusWord({ state, uploadId }: UploadItem): string {
  switch (state.step) {
    case "waiting":
      return "waiting";
    case "sending":
      return `${Math.round(100 * state.share)} %`;
    case "stored":
      return "sent";
    case "reading":
      return "reading";
    case "stopped":
      return "stopped";
    case "failed":
      return uploadId === null && state.again ? "not sent" : "not read";
    case "done":
      return verdictStatus(state.verdicts);
  }
}
