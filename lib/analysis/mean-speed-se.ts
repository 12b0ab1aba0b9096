import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";

/** How long an error of smoothed speed lasts (s): found on modelled receivers, no published source. */
export const SPEED_ERROR_TIME_S = 1.2;

/**
 * Share of the variance of a single error that is left in a mean over a time, for errors whose correlation falls
 * as exp(-t / tau): 2 (tau/T) (1 - (tau/T) (1 - exp(-T / tau))). 1 for a time of 0.
 *
 * Source: the variance of a time average, e.g. Papoulis 1991, section 12-1.
 *
 * @example
 * meanVarianceShare(0, 1); // 1
 */
export function meanVarianceShare(timeS: number, errorTimeS: number): number {
  if (timeS <= 0) return 1;
  const r = errorTimeS / timeS;
  return 2 * r * (1 - r * (1 - Math.exp(-1 / r)));
}

/**
 * Standard error of the mean speed over a stretch (m/s): the root mean square of the samples' standard errors,
 * lessened by the mean over errors that last about a second. NaN when the stretch meets no sample.
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
  return Math.sqrt((squares / (last - first + 1)) * meanVarianceShare(timeS, SPEED_ERROR_TIME_S));
}
