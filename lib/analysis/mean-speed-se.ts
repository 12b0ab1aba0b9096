import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";

/** Over this time (s) the errors of the two ends take over from the error of the speed itself. */
const ENDS_S = 3;
/** What waves and smoothing add to the way as it gets longer: a variance that grows with time. */
const PATH_WEIGHT = 0.9;
const PATH_S = 8;

/**
 * Share of the variance of a single speed's error that is left in a mean speed over a time (s).
 *
 * A mean speed is the way between two places by the time: the errors of the ends fall with the square of the time,
 * 1 / (1 + (T / 3)^2), those gathered along the path with the time, 0.9 / (T + 8). At most 1. The constants were found on
 * modelled receivers, no published source.
 *
 * @example
 * meanVarianceShare(0); // 1
 */
export function meanVarianceShare(timeS: number): number {
  return Math.min(1, 1 / (1 + (timeS / ENDS_S) ** 2) + PATH_WEIGHT / (timeS + PATH_S));
}

/**
 * Standard error of the mean speed over a stretch (m/s): the root mean square of the samples' standard errors,
 * lessened by the mean (see `meanVarianceShare`). NaN when the stretch meets no sample.
 */
export function meanSpeedSe(series: SpeedSeries, stretch: Stretch): number {
  const first = Math.max(0, Math.floor((stretch.startMs - series.startMs) / series.stepMs));
  const last = Math.min(series.count - 1, Math.ceil((stretch.endMs - series.startMs) / series.stepMs));
  let squares = 0;
  for (let i = first; i <= last; i++) {
    const error = series.speedSeMps[i] ?? NaN;
    squares += error * error;
  }
  const timeS = (stretch.endMs - stretch.startMs) / 1000;
  return Math.sqrt((squares / (last - first + 1)) * meanVarianceShare(timeS));
}
