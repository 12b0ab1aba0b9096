/** A uniform clock: sample i is at `startMs + i * stepMs`. */
export type UniformClock = { readonly startMs: number; readonly stepMs: number; readonly count: number };

const FINE_STEP_MS = 250;
/** Receivers of the trade record at 25 Hz at most (common practice, no source). */
const FINEST_STEP_MS = 40;
/** Bounds the memory of the fine columns to about 110 MB. */
const SAMPLES_MAX = 1_250_000;
const COARSER_STEPS_MS = [500, 1000, 2000, 5000];

/**
 * The fine clock of a track: whole steps of a quarter of a second, or of the recording's own step when that is shorter, inside
 * the first and the last fix. A track too long for 1.25 million samples gets the next coarser step (5.2 million seconds at most,
 * more than the longest span kept). Fewer than two fixes, or a NaN, give no samples.
 *
 * @example
 * uniformClock(1000, 2000, 1).count; // 5
 */
export function uniformClock(firstMs: number, lastMs: number, medianStepS: number): UniformClock {
  if (!(lastMs > firstMs))
    return { startMs: Number.isFinite(firstMs) ? firstMs : 0, stepMs: FINE_STEP_MS, count: 0 };
  const ownMs = Math.max(FINEST_STEP_MS, Math.round(medianStepS * 1000));
  let stepMs = Math.min(FINE_STEP_MS, Number.isFinite(ownMs) ? ownMs : FINE_STEP_MS);
  for (const coarser of COARSER_STEPS_MS) {
    if ((lastMs - firstMs) / stepMs < SAMPLES_MAX) break;
    stepMs = coarser;
  }
  const startMs = Math.ceil(firstMs / stepMs) * stepMs;
  return { startMs, stepMs, count: Math.max(0, Math.floor((lastMs - startMs) / stepMs) + 1) };
}
