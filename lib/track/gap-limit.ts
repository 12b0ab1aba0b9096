import { quantile } from "@/lib/numeric/quantile";

/** A hole between fixes is a gap when it is longer than this (s) and than so many usual steps: metrics 4. */
const GAP_S = 5;
const GAP_STEPS = 4;
/** A recorder that writes only when the way bends has long steps on straight ways: those are no gaps. */
const LONG_STEP_SHARE = 0.9;
const LONG_STEP_TIMES = 1.5;
const LOOKED_AT = 5000;

/**
 * Steps between fixes longer than this (s) are gaps: 5 s, 4 times the median step, or half as long again as the long steps of an uneven
 * recording (the 90th percentile). Times rise. Fewer than two fixes give 5 s.
 *
 * @example
 * gapLimitS(Float64Array.of(0, 2000, 4000, 9000)); // 8
 */
export function gapLimitS(timeMs: Float64Array): number {
  const stride = Math.max(1, Math.floor(timeMs.length / LOOKED_AT));
  const steps: number[] = [];
  for (let i = 1; i < timeMs.length; i += stride)
    steps.push(((timeMs[i] as number) - (timeMs[i - 1] as number)) / 1000);
  if (steps.length === 0) return GAP_S;
  const long = LONG_STEP_TIMES * quantile(steps, LONG_STEP_SHARE);
  return Math.max(GAP_S, GAP_STEPS * quantile(steps, 0.5), steps.length < 20 ? 0 : long);
}
