import { quantile } from "@/lib/numeric/quantile";

import type { TimedPlane } from "./local-velocity";

/**
 * How far (m) a fix of a sound receiver may lie off the curve through its neighbours: a fall or a tight turn reaches 2 m at fixes a second
 * apart and grows with the square of the step. Common practice, no source.
 */
const ALONE = { m: 3, mps2: 2, usual: 5 } as const;
/** Less is odd where several fixes within seconds are: a fall or the start of a turn leaves one or two. */
const MANY = { m: 1.2, mps2: 0.9, usual: 4 } as const;
const MANY_FIXES = 3;
const MANY_S = 8;
/** Odd fixes no further apart than this belong to one burst: its plateau may look quiet. */
const TOGETHER_S = 12;
/** Fixes next to an odd one are doubted with it. */
const MARGIN_S = 1.2;
/** Curves reach no further than this over four steps. */
const REACH_S = 12;
/** When more than this share is odd, it is no burst: the receiver is like that, and the noise scale says so. */
const SHARE_MAX = 0.25;

/**
 * Extra variance (m2 a axis) for each fix where reflections threw the receiver off for some seconds, 0 elsewhere; null when there is no such
 * place. Looked for is how far a fix lies off the cubic through the two fixes about a second and two seconds before and
 * after it, which a rider's own motion keeps small; the fixes from the first to the last odd one of a burst get the square of the
 * largest departure. Such fixes are nearly left to the motion model, and the standard errors there grow.
 *
 * @example
 * burstVarianceM2({ count: 0, timeS: new Float64Array(0), xM: new Float64Array(0), yM: new Float64Array(0) }, 1); // null
 */
export function burstVarianceM2(path: TimedPlane, medianStepS: number): Float64Array | null {
  const stride = Math.max(1, Math.round(1 / Math.max(medianStepS, 0.02)));
  const off = departures(path, stride);
  const usual = usualOf(off);
  const beyond = (i: number, limit: typeof ALONE | typeof MANY) => {
    const stepS = ((path.timeS[i + stride] as number) - (path.timeS[i - stride] as number)) / 2;
    return (off[i] as number) > Math.max(limit.m, limit.mps2 * stepS * stepS, limit.usual * usual);
  };
  const some: number[] = [];
  for (let i = 2 * stride; i + 2 * stride < path.count; i++) if (beyond(i, MANY)) some.push(i);
  const many = MANY_FIXES * stride - 1;
  const close = (from: number, to: number) =>
    (path.timeS[some[to] ?? -1] ?? Infinity) - (path.timeS[some[from] ?? -1] ?? -Infinity) <= MANY_S;
  const odd = some.filter((i, k) => {
    if (beyond(i, ALONE)) return true;
    for (let j = Math.max(0, k - many); j <= k; j++) if (close(j, j + many)) return true;
    return false;
  });
  if (odd.length === 0) return null;
  return spread(path, odd, off);
}

/** Distance of each fix from the cubic through its four neighbours a stride apart; NaN at the ends and across holes. */
function departures(path: TimedPlane, stride: number): Float64Array {
  const { timeS, xM, yM, count } = path;
  const off = new Float64Array(count).fill(NaN);
  for (let i = 2 * stride; i + 2 * stride < count; i++) {
    const t = timeS[i] as number;
    const a = (timeS[i - 2 * stride] as number) - t;
    const b = (timeS[i - stride] as number) - t;
    const c = (timeS[i + stride] as number) - t;
    const d = (timeS[i + 2 * stride] as number) - t;
    if (d - a > REACH_S) continue;
    // Lagrange's weights of the four neighbours at the time of the fix.
    const wa = (-b * -c * -d) / ((a - b) * (a - c) * (a - d));
    const wb = (-a * -c * -d) / ((b - a) * (b - c) * (b - d));
    const wc = (-a * -b * -d) / ((c - a) * (c - b) * (c - d));
    const wd = 1 - wa - wb - wc;
    const at = (axis: Float64Array) =>
      (axis[i] as number) -
      wa * (axis[i - 2 * stride] as number) -
      wb * (axis[i - stride] as number) -
      wc * (axis[i + stride] as number) -
      wd * (axis[i + 2 * stride] as number);
    const x = at(xM);
    const y = at(yM);
    off[i] = Math.sqrt(x * x + y * y);
  }
  return off;
}

/** The usual departure: the 70th percentile, from some thousands of fixes, over what it is of a standard deviation. */
function usualOf(off: Float64Array): number {
  const every = Math.max(1, Math.floor(off.length / 4000));
  const values: number[] = [];
  for (let i = 0; i < off.length; i += every) if (!Number.isNaN(off[i])) values.push(off[i] as number);
  // Rayleigh distribution: sqrt(-2 ln(1 - 0.7)).
  return values.length > 0 ? quantile(values, 0.7) / 1.552 : 0;
}

function spread(path: TimedPlane, odd: readonly number[], off: Float64Array): Float64Array | null {
  const { timeS, count } = path;
  const variance = new Float64Array(count);
  let covered = 0;
  for (let k = 0; k < odd.length;) {
    let last = k;
    let largest = off[odd[k] as number] as number;
    while (
      last + 1 < odd.length &&
      (timeS[odd[last + 1] as number] as number) - (timeS[odd[last] as number] as number) <= TOGETHER_S
    ) {
      last++;
      largest = Math.max(largest, off[odd[last] as number] as number);
    }
    let from = odd[k] as number;
    let to = odd[last] as number;
    const startS = (timeS[from] as number) - MARGIN_S;
    const endS = (timeS[to] as number) + MARGIN_S;
    while (from > 0 && (timeS[from - 1] as number) >= startS) from--;
    while (to + 1 < count && (timeS[to + 1] as number) <= endS) to++;
    variance.fill(largest * largest, from, to + 1);
    covered += to + 1 - from;
    k = last + 1;
  }
  return covered <= SHARE_MAX * count ? variance : null;
}
