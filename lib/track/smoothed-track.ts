/**
 * The cleaned, smoothed track on a fine uniform clock, the working form of the analysis: sample `i` is at
 * `startMs + i * stepMs` (a quarter of a second, or the recording's own step when that is shorter).
 * All columns have length `count`.
 *
 * `xM` (east) and `yM` (north) are chained local steps on the ellipsoid, metres from the first sample.
 * `speedMps` and `speedSeMps` come from the stiff smoother (detection); `speedMpsLoose` from the looser one
 * with the variance term of a speed's mean (lengths, bests). Velocities are those of the stiff smoother.
 * `gapS` is the length in seconds of the hole between fixes in which the sample lies, 0 where fixes are near.
 * `onWater` is 1 inside the times on the water, 0 ashore, in a car or outside the trimmed ends.
 */
export type SmoothedTrack = {
  readonly startMs: number;
  readonly stepMs: number;
  readonly count: number;
  readonly latDeg: Float64Array;
  readonly lonDeg: Float64Array;
  readonly xM: Float64Array;
  readonly yM: Float64Array;
  readonly vxMps: Float64Array;
  readonly vyMps: Float64Array;
  readonly speedMps: Float64Array;
  readonly speedSeMps: Float64Array;
  readonly speedMpsLoose: Float64Array;
  readonly gapS: Float32Array;
  readonly onWater: Uint8Array;
  readonly heartRateBpm: Float32Array | null;
};
