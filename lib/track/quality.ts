import type { TrackNote } from "@/lib/track/fixes";

export type QualityGrade = "A" | "B" | "C" | "D";

/** What the recording is worth: metrics 2. `reasons` and the notes are sentences for the rider. */
export type QualityReport = {
  readonly grade: QualityGrade;
  readonly reasons: readonly string[];
  readonly rateHz: number;
  readonly fixesRead: number;
  readonly fixesKept: number;
  readonly spikesDropped: number;
  readonly gapCount: number;
  readonly gapShare: number;
  readonly noiseM: number;
  readonly receiverSpeedUsed: boolean;
  readonly notes: readonly TrackNote[];
};
