import { describe, expect, it } from "vitest";
import type { CleanedFixes } from "@/lib/track/clean-fixes";
import type { QualityGrade } from "@/lib/track/quality";
import { qualityReport } from "@/lib/track/quality-grade";
import { GRADE_LIMITS } from "./grade-limits";

type Case = { everyS?: number; gapS?: number; noiseM?: number; droppedShare?: number };

/** The grade of a recording that is faultless but for one side. */
function gradeOf({ everyS = 1, gapS = 0, noiseM = 0.5, droppedShare = 0 }: Case): QualityGrade {
  const count = 20_001;
  const half = count / 2;
  const timeMs = Float64Array.from({ length: count }, (_, i) => (i * everyS + (i > half ? gapS : 0)) * 1000);
  const cleaned: CleanedFixes = {
    fixes: {
      count,
      timeMs,
      latDeg: new Float64Array(count),
      lonDeg: new Float64Array(count),
      elevationM: null,
      heartRateBpm: null,
      receiverSpeedMps: null,
      hdop: null,
      satellites: null,
      segmentStarts: Uint32Array.of(0),
    },
    medianStepS: everyS,
    spikesDropped: 0,
    notes: [],
  };
  const read = Math.round(count / (1 - droppedShare));
  return qualityReport(cleaned, { noiseScaleM: noiseM, receiverSpeed: "absent" }, read).grade;
}

const NEXT = { A: "B", B: "C", C: "D" } as const;

describe.each(GRADE_LIMITS)("the handbook's limits of grade $grade are those of the grading", (limits) => {
  const { grade } = limits;
  const worse = NEXT[grade];

  it("for the time between fixes", () => {
    expect(gradeOf({ everyS: limits.everyS * 0.99 })).toBe(grade);
    expect(gradeOf({ everyS: limits.everyS * 1.01 })).toBe(worse);
  });

  it("for the noise", () => {
    expect(gradeOf({ noiseM: limits.noiseM * 0.99 })).toBe(grade);
    expect(gradeOf({ noiseM: limits.noiseM * 1.01 })).toBe(worse);
  });

  it("for dropped fixes", () => {
    expect(gradeOf({ droppedShare: limits.droppedShare * 0.98 })).toBe(grade);
    expect(gradeOf({ droppedShare: limits.droppedShare * 1.02 })).toBe(worse);
  });

  it("for the time in gaps", () => {
    // Holes beyond ten minutes are breaks, not gaps: many short fixes make one hole of 200 to 500 s a small share.
    const share = limits.gapShare;
    const gapOf = (wanted: number) => (20_000 * 0.1 * wanted) / (1 - wanted);
    expect(gradeOf({ everyS: 0.1, gapS: gapOf(share * 0.95) })).toBe(grade);
    expect(gradeOf({ everyS: 0.1, gapS: gapOf(share * 1.05) })).toBe(worse);
  });
});
