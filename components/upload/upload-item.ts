import type { FileVerdict } from "@/lib/display/file-verdict";

/** What the server answers about a stored file. */
export type ImportResult =
  | { readonly ok: true; readonly verdicts: readonly FileVerdict[] }
  | { readonly ok: false; readonly message: string; readonly signedOut: boolean };

/**
 * Where a file is on its way: waiting for its turn, sending (share 0 to 1), stored (safe, waiting to be read), reading,
 * done, stopped by the rider, or failed at sending or reading with a sentence; `again` tells whether trying again can help.
 */
export type UploadState =
  | { readonly step: "waiting" }
  | { readonly step: "sending"; readonly share: number }
  | { readonly step: "stored" }
  | { readonly step: "reading" }
  | { readonly step: "done"; readonly verdicts: readonly FileVerdict[] }
  | { readonly step: "stopped" }
  | {
      readonly step: "failed";
      readonly text: string;
      readonly again: boolean;
      readonly signedOut: boolean;
    };

export type UploadItem = {
  readonly key: string;
  readonly name: string;
  readonly sizeBytes: number;
  /** Known once the bytes are stored. */
  readonly uploadId: string | null;
  /** The setup its sessions were tagged with when it was read. */
  readonly setupId: string | null;
  readonly state: UploadState;
};

/** Sessions in the log from these items, each once, in the order of the list. */
export function sessionIdsOf(items: readonly UploadItem[]): string[] {
  const ids = items.flatMap(({ state }) =>
    state.step === "done"
      ? state.verdicts.flatMap((verdict) => (verdict.kind === "read" ? [verdict.sessionId] : []))
      : [],
  );
  return [...new Set(ids)];
}

/** Those of the sessions above that carry another tag than the given one. */
export function taggedOtherwise(items: readonly UploadItem[], setupId: string | null): string[] {
  return sessionIdsOf(items.filter((item) => item.setupId !== setupId));
}

/** Whether leaving the page now would cut something short. */
export function isBusy(items: readonly UploadItem[]): boolean {
  return items.some(({ state }) => ["waiting", "sending", "stored", "reading"].includes(state.step));
}

const sentShare = ({ state }: UploadItem): number =>
  state.step === "waiting" ? 0 : state.step === "sending" ? state.share : 1;

/**
 * What is said to somebody who cannot see the bars: in steps of a quarter while files are sent, then once what came of them.
 * Empty when there is nothing to say.
 */
export function announcement(items: readonly UploadItem[]): string {
  if (items.length === 0) return "";
  const files = items.length === 1 ? "1 file" : `${items.length} files`;
  if (!isBusy(items)) return `${files}: ${outcomeWords(items)}.`;
  const bytes = items.reduce((sum, item) => sum + item.sizeBytes, 0);
  const sent = items.reduce((sum, item) => sum + item.sizeBytes * sentShare(item), 0);
  const quarters = bytes === 0 ? 4 : Math.floor((4 * sent) / bytes);
  if (quarters === 4) return `${files} sent. Reading.`;
  return quarters === 0 ? `Sending ${files}.` : `${quarters * 25} % of ${files} sent.`;
}

function outcomeWords(items: readonly UploadItem[]): string {
  const counts = { read: 0, known: 0, refused: 0, stopped: 0 };
  for (const { state } of items) {
    if (state.step === "stopped") counts.stopped += 1;
    else if (state.step === "failed") counts.refused += 1;
    else if (state.step === "done") {
      for (const { kind } of state.verdicts) {
        counts[kind === "read" ? "read" : kind === "refused" ? "refused" : "known"] += 1;
      }
    }
  }
  const parts = [
    counts.read > 0 ? `${counts.read} read` : null,
    counts.known > 0 ? `${counts.known} known already` : null,
    counts.refused > 0 ? `${counts.refused} not read` : null,
    counts.stopped > 0 ? `${counts.stopped} stopped` : null,
  ].filter((part) => part !== null);
  return parts.length === 0 ? "nothing read" : parts.join(", ");
}
