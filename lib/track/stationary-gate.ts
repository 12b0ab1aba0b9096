import { movingMean } from "@/lib/numeric/moving-mean";

import type { FineColumns } from "./fill-columns";

const WINDOW_S = 30;

/**
 * Net speed over a centred window, metres per second: the straight way between the window's ends over its time. Waves and noise that go
 * to and fro cancel in it. At the ends of the track the window is cut.
 *
 * @example
 * Array.from(netSpeed(Float64Array.of(0, 1, 2), Float64Array.of(0, 0, 0), 1)); // [1, 1, 1]
 */
export function netSpeed(xM: Float64Array, yM: Float64Array, halfWidth: number, stepS = 1): Float64Array {
  const n = xM.length;
  const out = new Float64Array(n);
  for (let k = 0; k < n; k++) {
    const a = Math.max(0, k - halfWidth);
    const b = Math.min(n - 1, k + halfWidth);
    if (b === a) continue;
    const dx = (xM[b] as number) - (xM[a] as number);
    const dy = (yM[b] as number) - (yM[a] as number);
    out[k] = Math.sqrt(dx * dx + dy * dy) / ((b - a) * stepS);
  }
  return out;
}

/**
 * Net speed over half a minute that a receiver at rest may show, for its noise scale: the slow error wanders by about its own
 * standard deviation in that time. The offset covers rounding in the file.
 *
 * @example
 * restSpeedMps(0); // 0.09
 */
export function restSpeedMps(noiseScaleM: number): number {
  return 0.09 + 0.035 * noiseScaleM;
}

/**
 * Holds speed and velocity at zero where the track is at rest, so that the wandering of a resting receiver does not add up to a way: net speed over half a
 * minute below what the receiver's slow error shows, and mean speed in that time below what its fast error shows (a tight circle
 * has no net speed but is no rest). Changes the columns in place.
 */
export function gateStationary(columns: FineColumns, stepS: number, noiseScaleM: number): void {
  const half = Math.max(1, Math.round(WINDOW_S / stepS / 2));
  const net = netSpeed(columns.xM, columns.yM, half, stepS);
  const mean = movingMean(columns.speedMps, half);
  // Wider than what counts as rest ashore: a slip through this gate adds way that was never gone.
  const netLimit = 0.09 + 0.05 * noiseScaleM;
  const meanLimit = 0.3 + 0.25 * noiseScaleM;
  for (let k = 0; k < net.length; k++) {
    if ((net[k] as number) >= netLimit || (mean[k] as number) >= meanLimit) continue;
    columns.vxMps[k] = 0;
    columns.vyMps[k] = 0;
    columns.speedMps[k] = 0;
    columns.speedMpsLoose[k] = 0;
  }
}
