import type { ParseErrorCode } from "@/lib/errors/parse-error";
import type { DistanceUnit } from "@/lib/units/length";
import { distanceWithUnit } from "./format-distance";
import { durationInWords } from "./format-duration";

/** Which session of the rider is meant. */
export type SessionRef = { readonly sessionId: string; readonly title: string };

/** A track that became a session. Seconds and metres; times UTC epoch milliseconds. */
export type ReadVerdict = SessionRef & {
  readonly kind: "read";
  /** Names the file in an archive, empty for a plain file. */
  readonly entryName: string;
  readonly startMs: number;
  readonly timeZone: string;
  readonly waterDistanceM: number;
  readonly elapsedS: number;
  /** Recording before and after the time on the water. */
  readonly cutBeforeS: number;
  readonly cutAfterS: number;
  /** Sentences about what was dropped, repaired or ignored. */
  readonly notes: readonly string[];
  /** Another session with the same start and end of recording. */
  readonly sameAs: SessionRef | null;
};

/** A track whose bytes are in the log (already), or were and can be brought back (deleted). */
export type KnownVerdict = SessionRef & {
  readonly kind: "already" | "deleted";
  readonly entryName: string;
};

/** A track that cannot be read, with the sentence that says why and what to do. */
export type RefusedVerdict = {
  readonly kind: "refused";
  readonly entryName: string;
  readonly code: ParseErrorCode;
  readonly text: string;
};

/** What became of one track of an uploaded file. */
export type FileVerdict = ReadVerdict | KnownVerdict | RefusedVerdict;

/** Shorter cuts than this are the seconds of pressing a button, not worth a sentence. */
const CUT_S_MIN = 60;

function cutWords(beforeS: number, afterS: number): string[] {
  const parts = [
    beforeS >= CUT_S_MIN ? `${durationInWords(60 * Math.round(beforeS / 60))} before` : null,
    afterS >= CUT_S_MIN ? `${durationInWords(60 * Math.round(afterS / 60))} after` : null,
  ].filter((part) => part !== null);
  return parts.length === 0 ? [] : [`Cut off: ${parts.join(" and ")} the time on the water.`];
}

/**
 * What became of a track, in one to three sentences: distance and time on the water and what was cut off at the ends; or
 * where the same bytes are; or why it was refused.
 *
 * @example
 * verdictWords({ "kind": "refused", "entryName": "", "code": "empty", "text": "The file is empty." }, "km"); // "The file is empty."
 */
export function verdictWords(verdict: FileVerdict, unit: DistanceUnit): string {
  if (verdict.kind === "refused") return verdict.text;
  if (verdict.kind !== "read") {
    return verdict.kind === "already"
      ? "This file is in your log already; nothing was added."
      : "This file was in your log and you deleted its session.";
  }
  if (verdict.elapsedS <= 0) {
    return "No time on the water was found in it: all of it looks like a drive or a walk. Open it to set the ends by hand.";
  }
  const way = `${distanceWithUnit(verdict.waterDistanceM, unit)} on the water in ${durationInWords(verdict.elapsedS)}.`;
  return [way, ...cutWords(verdict.cutBeforeS, verdict.cutAfterS)].join(" ");
}
