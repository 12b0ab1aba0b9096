import type { Discipline } from "./analysis";
import { quantile } from "@/lib/numeric/quantile";

/** Where the search for the session's own flying speed begins and may end, m/s. Common practice, no source. */
const STALL_MPS_START = 3.6;
const STALL_MPS_MIN = 2.6;
const STALL_MPS_MAX = 4.2;

/**
 * Slowest riding over stall: riders keep a reserve over the stall speed. On bumps the 5th percentile of on-foil
 * speed lies near 1.19 times stall (trials on modelled sessions; no published source). Under a hand wing the
 * reserve is larger and tells less, so the estimate is drawn towards the start value.
 */
const RESERVE_ON_BUMPS = 1.19;
const RESERVE_POWERED = 1.3;
const POWERED_WEIGHT = 0.6;

/** A known minimum flying speed of the setup may be off by this share (mass, lift coefficient). */
const KNOWN_TOLERANCE = 0.12;

const clamp = (value: number, low: number, high: number): number => Math.max(low, Math.min(high, value));

/**
 * Off and on foil are told apart at this multiple of the stall speed: just off the foil a standing rider above it
 * lifts off within a second.
 */
export const THRESHOLD_OVER_STALL = 1.1;

/**
 * The stall speed to begin with, m/s: the setup's minimum flying speed when known, else a usual one.
 *
 * @example
 * firstStallSpeed(null); // 3.6
 */
export function firstStallSpeed(minimumFlyingSpeedMps: number | null): number {
  return minimumFlyingSpeedMps ?? STALL_MPS_START;
}

/**
 * The stall speed that the session's own slow riding points to, m/s.
 *
 * In: speeds on foil away from take-off and touchdown (m/s, at least one), their standard error (m/s; noise widens
 * the low tail and is added back), the discipline, the setup's minimum flying speed when known.
 * Out: bounded to 2.6-4.2 m/s, which puts the threshold between 2.8 and 4.6 m/s, or to 12 % around the known one.
 *
 * @example
 * stallSpeedFrom([4.76, 4.76, 4.76], 0, { discipline: "downwind", minimumFlyingSpeedMps: null }); // 4
 */
export function stallSpeedFrom(
  speeds: ArrayLike<number>,
  seMps: number,
  options: { readonly discipline: Discipline; readonly minimumFlyingSpeedMps: number | null },
): number {
  const slow = quantile(speeds, 0.05) + 0.35 * seMps;
  const known = options.minimumFlyingSpeedMps;
  const low = known === null ? STALL_MPS_MIN : known * (1 - KNOWN_TOLERANCE);
  const high = known === null ? STALL_MPS_MAX : known * (1 + KNOWN_TOLERANCE);
  if (options.discipline === "downwind") return clamp(slow / RESERVE_ON_BUMPS, low, high);
  const start = firstStallSpeed(known);
  // Far above stall the slow tail says nothing about it any more: fade to the start value.
  const weight = POWERED_WEIGHT * clamp((6.2 - slow) / 1.2, 0, 1);
  return clamp(start + weight * (slow / RESERVE_POWERED - start), low, high);
}
