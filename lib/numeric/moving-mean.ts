import { invariant } from "@/lib/errors/invariant";

/**
 * Centred moving mean over `2 halfWidth + 1` samples; near the ends over those that exist. A sample that is not finite
 * gives NaN wherever the window has met it. Empty input gives an empty column.
 *
 * @throws Error when `halfWidth` is not a whole number of 0 or more.
 * @example
 * Array.from(movingMean([3, 0, 3, 6], 1)); // [1.5, 2, 3, 4.5]
 */
export function movingMean(samples: ArrayLike<number>, halfWidth: number): Float64Array {
  invariant(Number.isInteger(halfWidth) && halfWidth >= 0, "half width is a whole number of 0 or more");
  const n = samples.length;
  const sum = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) sum[i + 1] = (sum[i] ?? NaN) + (samples[i] ?? NaN);
  const mean = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const from = Math.max(0, i - halfWidth);
    const to = Math.min(n, i + halfWidth + 1);
    mean[i] = ((sum[to] ?? NaN) - (sum[from] ?? NaN)) / (to - from);
  }
  return mean;
}
