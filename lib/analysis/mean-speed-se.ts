import { FLAG_GAP, FLAG_ON_FOIL, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";

/** Over this time (s) the errors of the two ends take over from the error of the speed itself. */
const ENDS_S = 3;
/** What waves and smoothing add to the way as it gets longer: a variance that grows with time. */
const PATH_WEIGHT = 0.9;
const PATH_S = 8;

/** What smoothing takes off a sharp top (m/s), the less the longer the window (s). Trials, no source. */
const BLUNTING_MPS = 0.2;
const BLUNTING_S = 3;
/** What is not known of the way of a floating board in waves (m/s), and of the way across a hole in the recording. Trials, no source. */
const AFLOAT_MPS = 0.25;
const HOLE_MPS = 0.4;

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

/** Positions steadier than any receiver of the trade gives them (m) have been smoothed before they were written. */
const FILTERED_M = 0.35;
const FILTERED_HZ = 1.5;
/** What such a filter takes off a way, and how much more off a top of some seconds. Trials on a filter with 3 s lag, no source. */
const FILTERED_SHARE = 0.022;
const FILTERED_S = 5;

/**
 * Whether the recorder smoothed what it wrote: then tops are cut off by an unknown amount, and times are late by some seconds.
 *
 * @example
 * isFiltered({ noiseM: 0.2, rateHz: 1 }); // true
 */
export function isFiltered(quality: { readonly noiseM: number; readonly rateHz: number }): boolean {
  return quality.noiseM < FILTERED_M && quality.rateHz <= FILTERED_HZ;
}

/**
 * Share of a mean speed over a time (s) that is uncertain because the recorder smoothed the positions.
 *
 * @example
 * filteredShareSe(5); // 0.044
 */
export function filteredShareSe(timeS: number): number {
  return FILTERED_SHARE * (1 + FILTERED_S / timeS);
}

/**
 * Standard error of the mean speed over a stretch (m/s) from the noise: the root mean square of the samples' standard errors,
 * lessened by the mean (see `meanVarianceShare`). NaN when the stretch meets no sample.
 */
export function meanSpeedSe(series: SpeedSeries, stretch: Stretch): number {
  const { first, last } = samplesOf(series, stretch);
  let squares = 0;
  for (let i = first; i <= last; i++) {
    const error = series.speedSeMps[i] ?? NaN;
    squares += error * error;
  }
  const timeS = (stretch.endMs - stretch.startMs) / 1000;
  return Math.sqrt((squares / (last - first + 1)) * meanVarianceShare(timeS));
}

/**
 * What a mean speed over a stretch is uncertain by besides the noise (m/s): what smoothing takes off a sharp top; for the part off the
 * foil, that a floating board is swung by waves and how much of that is way is a matter of definition; for holes in the recording, what
 * was ridden across them.
 */
export function systematicSpeedSe(series: SpeedSeries, stretch: Stretch): number {
  const { first, last } = samplesOf(series, stretch);
  let afloat = 0;
  let holes = 0;
  for (let i = first; i <= last; i++) {
    const flags = series.flags[i] ?? 0;
    if ((flags & FLAG_ON_FOIL) === 0) afloat++;
    if ((flags & FLAG_GAP) !== 0) holes++;
  }
  const samples = Math.max(1, last - first + 1);
  const blunting = BLUNTING_MPS / (1 + (stretch.endMs - stretch.startMs) / (1000 * BLUNTING_S));
  return Math.hypot(blunting, (AFLOAT_MPS * afloat) / samples, (HOLE_MPS * holes) / samples);
}

function samplesOf(series: SpeedSeries, stretch: Stretch): { readonly first: number; readonly last: number } {
  return {
    first: Math.max(0, Math.floor((stretch.startMs - series.startMs) / series.stepMs)),
    last: Math.min(series.count - 1, Math.ceil((stretch.endMs - series.startMs) / series.stepMs)),
  };
}
