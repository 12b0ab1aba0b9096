import type { QualityGrade, QualityReport } from "@/lib/track/quality";

/** A quality report of a made recording: nothing dropped, one fix a second. */
export function madeQuality(grade: QualityGrade = "A", rateHz = 1): QualityReport {
  return {
    grade,
    reasons: [],
    rateHz,
    fixesRead: 0,
    fixesKept: 0,
    spikesDropped: 0,
    gapCount: 0,
    gapShare: 0,
    noiseM: 0,
    receiverSpeedUsed: false,
    notes: [],
  };
}
