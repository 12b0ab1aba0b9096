import { movingMean } from "@/lib/numeric/moving-mean";

import type { SmoothedTrack } from "./smoothed-track";
import { netSpeed } from "./stationary-gate";

/** Motion of a track on a clock of a quarter of a second or more, for finding where it is on the water. Columns of one length. */
export type CoarseMotion = {
  readonly count: number;
  readonly stepS: number;
  /** Samples of the fine track in one of these. */
  readonly stride: number;
  readonly xM: Float64Array;
  readonly yM: Float64Array;
  readonly speedMps: Float64Array;
  readonly speedSeMps: Float64Array;
  readonly gapS: Float64Array;
  /** Net speed over 4 and over 30 seconds. */
  readonly net4Mps: Float64Array;
  readonly net30Mps: Float64Array;
  /** Mean speed over 6 seconds. */
  readonly mean6Mps: Float64Array;
};

const STEP_S = 0.25;

/**
 * The coarse motion of a smoothed track: every n-th sample, with the net and mean speeds that tell water from land.
 *
 * @example
 * coarseMotion({ startMs: 0, stepMs: 250, count: 0, latDeg: new Float64Array(0), lonDeg: new Float64Array(0), xM: new Float64Array(0), yM: new Float64Array(0), vxMps: new Float64Array(0), vyMps: new Float64Array(0), speedMps: new Float64Array(0), speedSeMps: new Float64Array(0), speedMpsLoose: new Float64Array(0), gapS: new Float32Array(0), onWater: new Uint8Array(0), heartRateBpm: null }).count; // 0
 */
export function coarseMotion(track: SmoothedTrack): CoarseMotion {
  const stride = Math.max(1, Math.round((STEP_S * 1000) / track.stepMs));
  const count = Math.ceil(track.count / stride);
  const stepS = (stride * track.stepMs) / 1000;
  const thin = (column: ArrayLike<number>) =>
    stride === 1
      ? Float64Array.from(column)
      : Float64Array.from({ length: count }, (_, i) => column[i * stride] as number);
  const xM = thin(track.xM);
  const yM = thin(track.yM);
  const speedMps = thin(track.speedMps);
  const half = (seconds: number) => Math.max(1, Math.round(seconds / stepS / 2));
  return {
    count,
    stepS,
    stride,
    xM,
    yM,
    speedMps,
    speedSeMps: thin(track.speedSeMps),
    gapS: thin(track.gapS),
    net4Mps: netSpeed(xM, yM, half(4), stepS),
    net30Mps: netSpeed(xM, yM, half(30), stepS),
    mean6Mps: movingMean(speedMps, half(6)),
  };
}
