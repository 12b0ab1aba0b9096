import type { ParseErrorCode } from "@/lib/errors/parse-error";

/** Which session of the asker is meant. */
export type SessionRef = { readonly sessionId: string; readonly title: string };

/**
 * What became of one track of a file, for the screen. read: a new session. already: these bytes are in the log. deleted: they
 * were, and can be brought back. `entryName` names the file in an archive, empty for a plain file.
 */
export type FileVerdict =
  | ({
      readonly kind: "read";
      readonly entryName: string;
      readonly startMs: number;
      readonly timeZone: string;
      readonly waterDistanceM: number;
      readonly elapsedS: number;
      /** Seconds of recording before and after the time on the water. */
      readonly cutBeforeS: number;
      readonly cutAfterS: number;
      readonly notes: readonly string[];
      /** Another session with the same start and end of recording. */
      readonly sameAs: SessionRef | null;
    } & SessionRef)
  | ({ readonly kind: "already" | "deleted"; readonly entryName: string } & SessionRef)
  | {
      readonly kind: "refused";
      readonly entryName: string;
      readonly code: ParseErrorCode;
      readonly text: string;
    };
