import type { FileVerdict } from "@/lib/display/file-verdict";
import type { ImportResult } from "./upload-item";

/** What the page's form gives back when it was sent without JavaScript. */
export type PlainUpload = {
  /** Why nothing could be taken, or empty. */
  readonly problem: string;
  readonly files: readonly PlainFile[];
};
export type PlainFile = {
  readonly name: string;
  /** Why this file was not taken, or empty. */
  readonly problem: string;
  readonly verdicts: readonly FileVerdict[];
};

export type Done = { readonly ok: true } | { readonly ok: false; readonly message: string };

export type UploadLimits = { readonly filesMax: number; readonly bytesMax: number };

/** A file that an earlier visit sent and nobody read. */
export type WaitingUpload = {
  readonly uploadId: string;
  readonly fileName: string;
  readonly sizeBytes: number;
};

/** The server's part of the page, handed in by its route. */
export type UploadActions = {
  readonly importFile: (uploadId: string, setupId: string | null) => Promise<ImportResult>;
  readonly restore: (sessionId: string) => Promise<Done>;
  readonly tag: (sessionIds: readonly string[], setupId: string | null) => Promise<Done>;
  readonly sendPlain: (before: PlainUpload, form: FormData) => Promise<PlainUpload>;
};
