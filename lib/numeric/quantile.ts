/*
 * One policy for every estimator in this room: no data gives NaN, an element that is not finite gives NaN (nothing is
 * skipped silently), and shapes that disagree throw by invariant.
 */

/**
 * The sample quantile of type 7: linear between order statistics at position (n - 1) p. `p` in [0, 1]. The input is
 * not changed. Empty input, an element that is not finite, or a p outside [0, 1] gives NaN.
 * Source: Hyndman and Fan, The American Statistician 50 (1996), definition 7; R's default.
 *
 * @example
 * quantile([1, 2, 3, 4], 0.25); // 1.75
 */
export function quantile(values: ArrayLike<number>, p: number): number {
  const sorted = Float64Array.from(values).sort();
  return sortedQuantile(sorted, p);
}

/**
 * `quantile` of values that are already in ascending order (NaN last, as typed arrays sort them).
 *
 * @example
 * sortedQuantile([1, 2, 3, 4], 0.5); // 2.5
 */
export function sortedQuantile(sorted: ArrayLike<number>, p: number): number {
  const n = sorted.length;
  if (n === 0 || !(p >= 0 && p <= 1)) return NaN;
  if (!Number.isFinite(sorted[0]) || !Number.isFinite(sorted[n - 1])) return NaN;
  const position = (n - 1) * p;
  const i = Math.floor(position);
  const low = sorted[i] ?? NaN;
  return low + (position - i) * ((sorted[i + 1] ?? low) - low);
}

/**
 * The median: the quantile of type 7 at one half. Empty or not finite input gives NaN.
 *
 * @example
 * median([3, 1, 2]); // 2
 */
export function median(values: ArrayLike<number>): number {
  return quantile(values, 0.5);
}
