import { quantile } from "@/lib/numeric/quantile";

import type { MeasuredVelocity } from "./smooth-in-chunks";

/** What a first pass knows at the fixes: velocity, acceleration along the way, standard error of the speed. */
export type FirstPass = {
  readonly vxMps: Float64Array;
  readonly vyMps: Float64Array;
  readonly alongMps2: Float64Array;
  readonly seMps: Float64Array;
};

/** What came of the receiver's own speed: the velocities to use, or why it is not used. */
export type ReceiverSpeedVerdict =
  | { readonly used: true; readonly velocity: MeasuredVelocity; readonly lagS: number }
  | { readonly used: false; readonly reason: "absent" | "sparse" | "disagrees" };

const PRESENT_SHARE = 0.6;
const LAGS_S = [0, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3];
/** Lag of a receiver that says nothing about it: from trials, not from a publication. */
const LAG_S_ASSUMED = 0.12;
const LAG_FIXES_MIN = 200;
const COMPARED_MIN = 20;

/**
 * Whether a file speaks of the receiver's own speed often enough (six fixes in ten) to be worth a first pass.
 *
 * @example
 * hasReceiverSpeed(Float64Array.of(NaN, 3, 3)); // true
 */
export function hasReceiverSpeed(speedMps: Float64Array | null): speedMps is Float64Array {
  if (speedMps === null) return false;
  let present = 0;
  for (const speed of speedMps) if (speed >= 0 && speed < 100) present++;
  return speedMps.length > 0 && present > PRESENT_SHARE * speedMps.length;
}

/**
 * Turns the receiver's own speed (from Doppler shift, so its error is independent of the positions) into velocities along the course of a first
 * pass. Its lag behind the positions is found from the track. The speed as a whole is refused when it does not follow the positions
 * (another unit, a constant, another sensor): the middle ratio to the first pass must lie within 15 % of one and the middle difference under 1 m/s. Single
 * values are left out when they are a false zero or far from the first pass. Columns have one element a fix; the result has NaN variance where nothing is used.
 */
export function receiverVelocity(
  speedMps: Float64Array,
  first: FirstPass,
  noiseScaleM: number,
): ReceiverSpeedVerdict {
  const count = speedMps.length;
  const ratios: number[] = [];
  const differences: number[] = [];
  const stride = Math.max(1, Math.floor(count / 20_000));
  for (let i = 0; i < count; i += stride) {
    const v = speedAt(first, i);
    const said = speedMps[i] as number;
    if (!(v > 2) || !(said >= 0)) continue;
    ratios.push(said / v);
    differences.push(Math.abs(said - v));
  }
  if (ratios.length < COMPARED_MIN) return { used: false, reason: "sparse" };
  if (Math.abs(quantile(ratios, 0.5) - 1) > 0.15 || quantile(differences, 0.5) > 1) {
    return { used: false, reason: "disagrees" };
  }
  const lagS = findLag(speedMps, first);
  return { used: true, velocity: velocitiesAlong(speedMps, first, { noiseScaleM, lagS }), lagS };
}

function speedAt(first: FirstPass, i: number): number {
  const vx = first.vxMps[i] as number;
  const vy = first.vyMps[i] as number;
  return Math.sqrt(vx * vx + vy * vy);
}

function findLag(speedMps: Float64Array, first: FirstPass): number {
  let best = { misfit: Infinity, lagS: LAG_S_ASSUMED };
  for (const lagS of LAGS_S) {
    let sum = 0;
    let n = 0;
    for (let i = 1; i + 1 < speedMps.length; i++) {
      const v = speedAt(first, i);
      const said = speedMps[i] as number;
      if (!(v >= 3) || !(said >= 1)) continue;
      sum += Math.min(1, (said - v + lagS * (first.alongMps2[i] as number)) ** 2);
      n++;
    }
    if (n > LAG_FIXES_MIN && sum / n < best.misfit) best = { misfit: sum / n, lagS };
  }
  return best.lagS;
}

function velocitiesAlong(
  speedMps: Float64Array,
  first: FirstPass,
  setting: { readonly noiseScaleM: number; readonly lagS: number },
): MeasuredVelocity {
  const count = speedMps.length;
  const vxMps = new Float64Array(count);
  const vyMps = new Float64Array(count);
  const variance = new Float64Array(count).fill(NaN);
  const base = (0.15 + 0.03 * setting.noiseScaleM) ** 2;
  for (let i = 0; i < count; i++) {
    const vx = first.vxMps[i] as number;
    const vy = first.vyMps[i] as number;
    const v = Math.sqrt(vx * vx + vy * vy);
    const raw = speedMps[i] as number;
    if (!(raw >= 0) || !Number.isFinite(v) || (raw === 0 && v > 1.2)) continue;
    const said = raw + (v > 1 ? setting.lagS * (first.alongMps2[i] as number) : 0);
    if (Math.abs(said - v) > 1.5 + 4 * (first.seMps[i] as number)) continue;
    const scale = said / Math.max(0.3, v);
    vxMps[i] = vx * scale;
    vyMps[i] = vy * scale;
    // Slow speeds have no course to lay them along, and receivers round them to zero.
    variance[i] = base + (v < 1.2 ? 0.5 : 0);
  }
  return { vxMps, vyMps, variance };
}
