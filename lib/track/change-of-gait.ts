import type { CoarseMotion } from "./coarse-motion";

/** How far to either side of a possible change the motion is compared, seconds. */
const SIDE_S = 55;
/** Fewer seconds than this on a side say nothing. */
const SIDE_S_MIN = 6;

/** One sample a second from `start` on in a direction, until `seconds` or the first one faster than `limitMps`. */
export type GaitSearch = {
  readonly start: number;
  readonly direction: 1 | -1;
  readonly seconds: number;
  readonly limitMps: number;
  /** Standard error of the speed: steadiness below it cannot be seen. */
  readonly seMps: number;
};

/**
 * How much better two gaits, one on each side, explain the speeds around a second than one gait does: the logarithm of the
 * likelihood ratio of two normal distributions against one, up to 55 s to each side. Returns a function of the seconds from the start of the
 * search; 0 where a side is too short. Walking is steadier than paddling in waves, and mostly not of the same speed.
 * Source: Page, Biometrika 42 (1955), for the change-point problem; the normal ratio is the textbook one.
 */
export function changeOfGait(motion: CoarseMotion, search: GaitSearch): (second: number) => number {
  const length = search.seconds + SIDE_S + 1;
  const sum = new Float64Array(length + 1);
  const square = new Float64Array(length + 1);
  let n = 0;
  for (; n < length; n++) {
    const v = motion.speedMps[search.start + search.direction * Math.round(n / motion.stepS)] ?? NaN;
    if (!(v <= search.limitMps) && n > 3) break;
    sum[n + 1] = (sum[n] as number) + v;
    square[n + 1] = (square[n] as number) + v * v;
  }
  const floor = (0.05 + 0.25 * search.seMps) ** 2;
  const logSpread = (a: number, b: number) => {
    const mean = ((sum[b] as number) - (sum[a] as number)) / (b - a);
    const variance = ((square[b] as number) - (square[a] as number)) / (b - a) - mean * mean;
    return Math.log(floor + Math.max(0, variance));
  };
  return (second) => {
    const a = Math.max(0, second - SIDE_S);
    const b = Math.min(n, second + SIDE_S);
    if (second - a < SIDE_S_MIN || b - second < SIDE_S_MIN) return 0;
    const one = (b - a) * logSpread(a, b);
    const two = (second - a) * logSpread(a, second) + (b - second) * logSpread(second, b);
    return 0.5 * (one - two);
  };
}
