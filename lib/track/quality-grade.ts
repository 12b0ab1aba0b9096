import type { CleanedFixes } from "./clean-fixes";
import { gapLimitS } from "./gap-limit";
import type { QualityGrade, QualityReport } from "./quality";
import type { Smoothing } from "./smooth-track";

/** Gaps beyond ten minutes are breaks in the recording. */
const BREAK_S = 600;
/** Noisier positions keep the grade from B. */
const NOISE_M_B = 2.6;

/** Number of gaps, and the share of the recorded time that lies in them. */
export type Gaps = {
  readonly count: number;
  readonly share: number;
  readonly recordedS: number;
  readonly breaks: number;
};

/**
 * Gaps of a track whose times rise: see `gapLimitS`. Steps beyond ten minutes are breaks, neither gap nor
 * recorded time. No fixes give zeros.
 *
 * @example
 * findGaps(Float64Array.of(0, 1000, 9000, 10000)).count; // 1
 */
export function findGaps(timeMs: Float64Array): Gaps {
  const limitS = gapLimitS(timeMs);
  let count = 0;
  let breaks = 0;
  let gapS = 0;
  let recordedS = 0;
  for (let i = 1; i < timeMs.length; i++) {
    const dt = ((timeMs[i] as number) - (timeMs[i - 1] as number)) / 1000;
    if (dt > Math.max(BREAK_S, limitS)) {
      breaks++;
      continue;
    }
    recordedS += dt;
    if (dt > limitS) {
      count++;
      gapS += dt;
    }
  }
  return { count, share: recordedS > 0 ? gapS / recordedS : 0, recordedS, breaks };
}

type Measure = {
  readonly value: number;
  readonly limits: readonly [number, number, number];
  readonly reason: string;
};

const GRADES: readonly QualityGrade[] = ["A", "B", "C", "D"];

const percent = (share: number) => {
  const value = 100 * share;
  return `${value > 0 && value < 10 ? value.toFixed(1) : Math.round(value)} %`;
};

/**
 * Grades a recording A to D by its worst side: fixes a second, time in gaps, noise, and share of dropped fixes, each with limits for A, B and C.
 * The limits are ours: at the edge from B to C the standard error of a best over 2 s passes about 5 %. `reasons` says in words
 * what keeps the grade from A, worst first, or what is good.
 */
export function qualityReport(
  cleaned: CleanedFixes,
  smoothing: Pick<Smoothing, "noiseScaleM" | "receiverSpeed">,
  fixesRead: number,
): QualityReport {
  const kept = cleaned.fixes.count;
  const gaps = findGaps(cleaned.fixes.timeMs);
  const activeS = gaps.recordedS * (1 - gaps.share);
  const rateHz = activeS > 0 ? (kept - 1 - gaps.count - gaps.breaks) / activeS : 0;
  const dropped = fixesRead > 0 ? (fixesRead - kept) / fixesRead : 1;
  const noiseM = smoothing.noiseScaleM;
  const everyS = rateHz > 0 ? 1 / rateHz : Infinity;
  const every = Number.isFinite(everyS)
    ? `one fix every ${everyS.toFixed(everyS < 10 ? 1 : 0)} s`
    : "no usable fixes";
  const measures: Measure[] = [
    { value: everyS, limits: [1.15, 3, 8], reason: `The recording is coarse: ${every}.` },
    {
      value: gaps.share,
      limits: [0.01, 0.05, 0.2],
      reason: `${percent(gaps.share)} of the time lies in gaps.`,
    },
    {
      // Speeds from the receiver itself do not suffer from its positions.
      value: smoothing.receiverSpeed === "used" ? Math.min(noiseM, NOISE_M_B) : noiseM,
      limits: [1.3, NOISE_M_B, 4.5],
      reason: `The positions are noisy: about ${noiseM.toFixed(1)} m.`,
    },
    { value: dropped, limits: [0.02, 0.06, 0.25], reason: `${percent(dropped)} of the fixes were dropped.` },
  ];
  const level = (m: Measure) => m.limits.filter((limit) => m.value > limit).length;
  const worst = kept < 2 ? 3 : Math.max(...measures.map(level));
  const reasons = measures
    .filter((m) => level(m) > 0)
    .sort((a, b) => level(b) - level(a))
    .map((m) => m.reason);
  return {
    grade: GRADES[worst] ?? "D",
    reasons: reasons.length > 0 ? reasons : ["Steady recording, few gaps, low noise."],
    rateHz,
    fixesRead,
    fixesKept: kept,
    spikesDropped: cleaned.spikesDropped,
    gapCount: gaps.count,
    gapShare: gaps.share,
    noiseM,
    receiverSpeedUsed: smoothing.receiverSpeed === "used",
    notes: cleaned.notes,
  };
}
