import type { QualityGrade } from "@/lib/track/quality";

/** What the handbook says of the grades; a test compares it with the grading itself. */
export const GRADE_LIMITS: readonly {
  readonly grade: Exclude<QualityGrade, "D">;
  readonly everyS: number;
  readonly gapShare: number;
  readonly noiseM: number;
  readonly droppedShare: number;
}[] = [
  { grade: "A", everyS: 1.15, gapShare: 0.01, noiseM: 1.3, droppedShare: 0.02 },
  { grade: "B", everyS: 3, gapShare: 0.05, noiseM: 2.6, droppedShare: 0.06 },
  { grade: "C", everyS: 8, gapShare: 0.2, noiseM: 4.5, droppedShare: 0.25 },
];
