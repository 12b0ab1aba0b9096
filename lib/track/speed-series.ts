/** Bits of `SpeedSeries.flags`. */
export const FLAG_GAP = 1;
export const FLAG_ON_WATER = 2;
export const FLAG_ON_FOIL = 4;
/** A hole shorter than a gap but longer than the recording's usual step: bridged for distance, never a best speed. */
export const FLAG_DROPOUT = 8;

/**
 * The smoothed track on a uniform clock: sample `i` is at `startMs + i * stepMs`. One second a step, or the
 * recording's own rate when that is faster. All columns have length `count`.
 *
 * Units: degrees WGS84 for positions, m/s for speed over ground and its standard error, degrees true for
 * course (NaN when standing), metres for `distanceM` (cumulated way under way from the first sample, never
 * falling; constant outside the water and over gaps longer than is bridged), beats per minute (NaN where unknown).
 * `flags` is a bit set of FLAG_GAP (no fixes near this sample), FLAG_ON_WATER, FLAG_ON_FOIL, FLAG_DROPOUT.
 */
export type SpeedSeries = {
  readonly startMs: number;
  readonly stepMs: number;
  readonly count: number;
  readonly latDeg: Float64Array;
  readonly lonDeg: Float64Array;
  readonly speedMps: Float32Array;
  readonly speedSeMps: Float32Array;
  readonly courseDeg: Float32Array;
  readonly distanceM: Float64Array;
  readonly heartRateBpm: Float32Array | null;
  readonly flags: Uint8Array;
};

/** A stretch of time, UTC epoch milliseconds, end not before start. */
export type Stretch = { readonly startMs: number; readonly endMs: number };
