/**
 * Cumulated integral of equally spaced samples by the trapezoid rule: element i is the integral from sample 0 to i;
 * the first is 0. `step` is the spacing in the unit of the abscissa. Empty input gives an empty column; a sample that is not
 * finite makes the rest NaN.
 *
 * @example
 * Array.from(cumulativeIntegral([0, 1, 2], 2)); // [0, 1, 4]
 */
export function cumulativeIntegral(samples: ArrayLike<number>, step: number): Float64Array {
  const sum = new Float64Array(samples.length);
  for (let i = 1; i < samples.length; i++) {
    sum[i] = (sum[i - 1] ?? NaN) + 0.5 * step * ((samples[i - 1] ?? NaN) + (samples[i] ?? NaN));
  }
  return sum;
}
