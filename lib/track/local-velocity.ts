import type { Plane } from "@/lib/geo/chained-plane";

/** A path on the plane over time, columns of one length. */
export type TimedPlane = Plane & { readonly count: number; readonly timeS: Float64Array };

/** Velocity in metres per second east and north; reused from call to call. */
export type Velocity = { east: number; north: number };

const CHORDS_MAX = 8;
const CHORD_S_MIN = 0.5;

const eastScratch = new Float64Array(CHORDS_MAX);
const northScratch = new Float64Array(CHORDS_MAX);

function insertSorted(values: Float64Array, length: number, value: number): void {
  let k = length;
  while (k > 0 && (values[k - 1] as number) > value) {
    values[k] = values[k - 1] as number;
    k--;
  }
  values[k] = value;
}

function middle(values: Float64Array, length: number): number {
  const half = length >> 1;
  const upper = values[half] as number;
  return length % 2 === 1 ? upper : 0.5 * (upper + (values[half - 1] as number));
}

/**
 * Robust velocity of a path just before (`direction` -1) or after (+1) fix `from`: the median of up to eight chords of
 * half a second or more within `reachS` seconds. Writes into `into`; false (and zero velocity) when there is no chord.
 *
 * @example
 * localVelocity({ count: 2, timeS: Float64Array.of(0, 1), xM: Float64Array.of(0, 3), yM: Float64Array.of(0, 4) }, { from: 0, direction: 1, reachS: 4 }, { east: 0, north: 0 }); // true
 */
export function localVelocity(
  path: TimedPlane,
  where: { readonly from: number; readonly direction: 1 | -1; readonly reachS: number },
  into: Velocity,
): boolean {
  const { from, direction, reachS } = where;
  const t0 = path.timeS[from] as number;
  let near = from;
  let n = 0;
  for (let far = from + direction; far >= 0 && far < path.count && n < CHORDS_MAX; far += direction) {
    if (Math.abs((path.timeS[far] as number) - t0) > reachS) break;
    const dt = (path.timeS[far] as number) - (path.timeS[near] as number);
    if (Math.abs(dt) < CHORD_S_MIN) continue;
    insertSorted(eastScratch, n, ((path.xM[far] as number) - (path.xM[near] as number)) / dt);
    insertSorted(northScratch, n, ((path.yM[far] as number) - (path.yM[near] as number)) / dt);
    near = far;
    n++;
  }
  into.east = n ? middle(eastScratch, n) : 0;
  into.north = n ? middle(northScratch, n) : 0;
  return n > 0;
}
