import { metresPerDegreeEast, metresPerDegreeNorth } from "@/lib/geo/ellipsoid";
import { wrapLongitudeDeg } from "@/lib/geo/longitude";

import type { Fixes } from "./fixes";
import type { TimedPlane } from "./local-velocity";
import type { FixRun, SmoothedChunk } from "./smooth-in-chunks";
import type { UniformClock } from "./uniform-clock";

/** A clock in the seconds of a `TimedPlane`: sample k at `startS + k * stepS`. */
export type PlaneClock = { readonly startS: number; readonly stepS: number; readonly count: number };

/**
 * A uniform clock in seconds from the first fix.
 *
 * @example
 * planeClock({ startMs: 2000, stepMs: 250, count: 3 }, 1000).startS; // 1
 */
export function planeClock(clock: UniformClock, firstMs: number): PlaneClock {
  return { startS: (clock.startMs - firstMs) / 1000, stepS: clock.stepMs / 1000, count: clock.count };
}

/** Path between two smoothed nodes: one polynomial of degree five an axis, which meets position, velocity and acceleration at both ends. */
export class NodeInterval {
  x = 0;
  y = 0;
  vx = 0;
  vy = 0;
  private readonly cx = new Float64Array(6);
  private readonly cy = new Float64Array(6);

  /** Takes the interval from node i to node i + 1 of a chunk. */
  take(chunk: SmoothedChunk, i: number): void {
    const { states: s } = chunk;
    const t = (chunk.timeS[i + 1] as number) - (chunk.timeS[i] as number);
    setCoefficients(this.cx, t, [s.xM, s.vxMps, s.axMps2], i);
    setCoefficients(this.cy, t, [s.yM, s.vyMps, s.ayMps2], i);
  }

  /** Position and velocity `u` seconds into the interval. */
  evaluate(u: number): void {
    this.x = polynomial(this.cx, u);
    this.y = polynomial(this.cy, u);
    this.vx = derivative(this.cx, u);
    this.vy = derivative(this.cy, u);
  }
}

/** The quintic Hermite polynomial in powers of the time from the first node. */
function setCoefficients(c: Float64Array, t: number, columns: readonly Float64Array[], i: number): void {
  const [p, v, a] = columns as [Float64Array, Float64Array, Float64Array];
  const v0 = v[i] as number;
  const a0 = a[i] as number;
  const d = (p[i + 1] as number) - (p[i] as number) - t * v0 - 0.5 * a0 * t * t;
  const dv = ((v[i + 1] as number) - v0 - a0 * t) * t;
  const da = 0.5 * ((a[i + 1] as number) - a0) * t * t;
  const t3 = t * t * t;
  c[0] = p[i] as number;
  c[1] = v0;
  c[2] = 0.5 * a0;
  c[3] = (10 * d - 4 * dv + da) / t3;
  c[4] = (-15 * d + 7 * dv - 2 * da) / (t3 * t);
  c[5] = (6 * d - 3 * dv + da) / (t3 * t * t);
}

function polynomial(c: Float64Array, u: number): number {
  const high = (c[3] as number) + u * ((c[4] as number) + u * (c[5] as number));
  return (c[0] as number) + u * ((c[1] as number) + u * ((c[2] as number) + u * high));
}

function derivative(c: Float64Array, u: number): number {
  const high = 3 * (c[3] as number) + u * (4 * (c[4] as number) + 5 * u * (c[5] as number));
  return (c[1] as number) + u * (2 * (c[2] as number) + u * high);
}

const TIE_S = 1e-7;

/**
 * Goes through the samples of a clock that lie inside a chunk, in order: `visit(k, interval, i, share)` with the sample, its
 * path already evaluated, the node before it and the share of the way to the next node (0 to 1). `from` is the first sample not
 * yet visited; the return value is the next one.
 */
export function eachSample(
  chunk: SmoothedChunk,
  clock: PlaneClock,
  from: number,
  visit: (k: number, interval: NodeInterval, i: number, share: number) => void,
): number {
  const interval = new NodeInterval();
  let k = Math.max(from, Math.ceil(((chunk.timeS[0] as number) - clock.startS - TIE_S) / clock.stepS));
  for (let i = 0; i + 1 < chunk.count && k < clock.count; i++) {
    const t0 = chunk.timeS[i] as number;
    const t1 = chunk.timeS[i + 1] as number;
    if (clock.startS + k * clock.stepS > t1 + TIE_S) continue;
    interval.take(chunk, i);
    while (k < clock.count) {
      const t = clock.startS + k * clock.stepS;
      if (t > t1 + TIE_S) break;
      const u = Math.min(t1, Math.max(t0, t)) - t0;
      interval.evaluate(u);
      visit(k, interval, i, u / (t1 - t0));
      k++;
    }
  }
  return k;
}

/** Fine columns while they are being filled; all of length `count`. */
export type FineColumns = {
  readonly latDeg: Float64Array;
  readonly lonDeg: Float64Array;
  readonly xM: Float64Array;
  readonly yM: Float64Array;
  readonly vxMps: Float64Array;
  readonly vyMps: Float64Array;
  readonly speedMps: Float64Array;
  readonly speedSeMps: Float64Array;
  readonly speedMpsLoose: Float64Array;
};

/** Where the smoothed path of each run begins and ends, metres on the plane. */
export type RunEnds = {
  readonly startX: Float64Array;
  readonly startY: Float64Array;
  readonly endX: Float64Array;
  readonly endY: Float64Array;
};

/**
 * Places around a fix: turns a point of the plane near fix `take(i)` back into degrees. The plane is chained, so only the
 * neighbourhood of the fix is right.
 */
export class PlaceNearFix {
  private fix = -1;
  private perNorth = 1;
  private perEast = 1;

  constructor(
    private readonly fixes: Fixes,
    private readonly path: TimedPlane,
  ) {}

  take(fix: number): void {
    if (fix === this.fix) return;
    this.fix = fix;
    const lat = this.fixes.latDeg[fix] as number;
    this.perNorth = metresPerDegreeNorth(lat);
    this.perEast = Math.max(metresPerDegreeEast(lat), 1);
  }

  write(columns: FineColumns, k: number, x: number, y: number): void {
    const f = this.fix;
    const lat = (this.fixes.latDeg[f] as number) + (y - (this.path.yM[f] as number)) / this.perNorth;
    const lon = (this.fixes.lonDeg[f] as number) + (x - (this.path.xM[f] as number)) / this.perEast;
    columns.latDeg[k] = Math.min(90, Math.max(-90, lat));
    columns.lonDeg[k] = wrapLongitudeDeg(lon);
  }
}

/** Standard error of a speed that is only a chord across a hole. */
const HOLE_SE_MPS = 1;
const LEAP_MPS = 75;

/**
 * Fills the samples in the holes between runs with the straight way from the end of one to the start of the next, at its even
 * speed (0 for a leap faster than 75 m/s, which nobody rode).
 */
export function bridgeHoles(
  columns: FineColumns,
  clock: PlaneClock,
  track: {
    readonly fixes: Fixes;
    readonly path: TimedPlane;
    readonly runs: readonly FixRun[];
    readonly ends: RunEnds;
  },
): void {
  const { path, runs, ends, fixes } = track;
  for (let r = 0; r + 1 < runs.length; r++) {
    const a = runs[r]?.to ?? 0;
    const b = runs[r + 1]?.from ?? 0;
    const t0 = path.timeS[a] as number;
    const t1 = path.timeS[b] as number;
    const dx = (ends.startX[r + 1] as number) - (ends.endX[r] as number);
    const dy = (ends.startY[r + 1] as number) - (ends.endY[r] as number);
    const still = Math.hypot(dx, dy) > LEAP_MPS * (t1 - t0);
    const vx = still ? 0 : dx / (t1 - t0);
    const vy = still ? 0 : dy / (t1 - t0);
    const dLon = wrapLongitudeDeg((fixes.lonDeg[b] as number) - (fixes.lonDeg[a] as number));
    const dLat = (fixes.latDeg[b] as number) - (fixes.latDeg[a] as number);
    let k = Math.max(0, Math.ceil((t0 - clock.startS - TIE_S) / clock.stepS));
    if (runs[r]?.from !== a && Math.abs(clock.startS + k * clock.stepS - t0) <= TIE_S) k++;
    for (; k < clock.count && clock.startS + k * clock.stepS < t1 - TIE_S; k++) {
      const share = (clock.startS + k * clock.stepS - t0) / (t1 - t0);
      columns.xM[k] = (ends.endX[r] as number) + share * dx;
      columns.yM[k] = (ends.endY[r] as number) + share * dy;
      columns.vxMps[k] = vx;
      columns.vyMps[k] = vy;
      columns.speedMps[k] = Math.hypot(vx, vy);
      columns.speedMpsLoose[k] = columns.speedMps[k] as number;
      columns.speedSeMps[k] = HOLE_SE_MPS;
      columns.latDeg[k] = (fixes.latDeg[a] as number) + share * dLat;
      columns.lonDeg[k] = wrapLongitudeDeg((fixes.lonDeg[a] as number) + share * dLon);
    }
  }
}
