import type { TimedPlane } from "./local-velocity";
import type { FixRun } from "./smooth-in-chunks";

/** Longest hole the smoother goes through, seconds; longer ones split the track. */
const HOLE_S = 25;
/** Faster than any vehicle of a session: a leap between two fixes that the cleaning could not explain is a break, never a way. */
const LEAP_MPS = 75;
const LEAP_M = 60;

/**
 * The runs of fixes that are smoothed as one path: split at holes longer than max(25 s, 4 x the usual step) and at leaps faster than
 * 75 m/s. Every fix belongs to one run; a run may be a single fix.
 *
 * @example
 * findRuns({ count: 2, timeS: Float64Array.of(0, 100), xM: Float64Array.of(0, 0), yM: Float64Array.of(0, 0) }, 1); // [{ from: 0, to: 0 }, { from: 1, to: 1 }]
 */
export function findRuns(path: TimedPlane, medianStepS: number): FixRun[] {
  const holeS = Math.max(HOLE_S, 4 * (Number.isFinite(medianStepS) ? medianStepS : 0));
  const found: FixRun[] = [];
  let from = 0;
  for (let i = 1; i <= path.count; i++) {
    if (i < path.count) {
      const dt = (path.timeS[i] as number) - (path.timeS[i - 1] as number);
      const dx = (path.xM[i] as number) - (path.xM[i - 1] as number);
      const dy = (path.yM[i] as number) - (path.yM[i - 1] as number);
      const step = Math.sqrt(dx * dx + dy * dy);
      if (dt <= holeS && !(step > LEAP_M && step > LEAP_MPS * dt)) continue;
    }
    found.push({ from, to: i - 1 });
    from = i;
  }
  return found;
}
