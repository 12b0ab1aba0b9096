import { destination, type Place } from "@/lib/geo/geodesic";
import { seededRng, standardNormal } from "@/lib/numeric/rng";
import type { Fixes } from "@/lib/track/fixes";

/** How a made track moves at a time: true speed in m/s and course in degrees. */
export type Motion = (timeS: number) => { readonly speedMps: number; readonly courseDeg: number };

export type MadeTrack = { readonly fixes: Fixes; readonly trueSpeedMps: number[]; readonly trueWayM: number };

export type MadeOptions = {
  readonly seconds: number;
  readonly hz?: number;
  /** Standard deviation of the slow part of the receiver's error a axis; the fast and white parts are 0.35 and 0.13 of it. */
  readonly noiseM?: number;
  readonly seed?: number;
  readonly start?: Place;
  readonly startMs?: number;
  readonly receiverSpeed?: boolean;
};

/** A track as a receiver with slow, fast and white error would record it, from a motion that is known exactly. */
export function makeTrack(motion: Motion, options: MadeOptions): MadeTrack {
  const { seconds, hz = 1, noiseM = 0, seed = 1, start = { latDeg: 57.1, lonDeg: 9.3 } } = options;
  const startMs = options.startMs ?? Date.UTC(2025, 5, 14, 10, 0, 0);
  const rng = seededRng(seed);
  const count = Math.floor(seconds * hz) + 1;
  const errors = [correlated(noiseM, 45 * hz, rng), correlated(noiseM, 45 * hz, rng)] as const;
  const quick = [correlated(0.35 * noiseM, 3 * hz, rng), correlated(0.35 * noiseM, 3 * hz, rng)] as const;
  const times: number[] = [];
  const lats: number[] = [];
  const lons: number[] = [];
  const trueSpeedMps: number[] = [];
  let here = start;
  let way = 0;
  for (let i = 0; i < count; i++) {
    const now = motion(i / hz);
    const north = errors[0]() + quick[0]() + 0.13 * noiseM * standardNormal(rng);
    const east = errors[1]() + quick[1]() + 0.13 * noiseM * standardNormal(rng);
    const seen = destination(here, (Math.atan2(east, north) * 180) / Math.PI, Math.hypot(east, north));
    times.push(startMs + Math.round((i * 1000) / hz));
    lats.push(seen.latDeg);
    lons.push(seen.lonDeg);
    trueSpeedMps.push(now.speedMps);
    const middle = motion((i + 0.5) / hz);
    here = destination(here, middle.courseDeg, middle.speedMps / hz);
    if (i + 1 < count) way += middle.speedMps / hz;
  }
  const said = options.receiverSpeed
    ? trueSpeedMps.map((v) => Math.max(0, v + 0.1 * standardNormal(rng)))
    : null;
  return { fixes: fixesOf(times, lats, lons, said), trueSpeedMps, trueWayM: way };
}

function correlated(sd: number, steps: number, rng: () => number): () => number {
  const keep = Math.exp(-1 / steps);
  let value = sd * standardNormal(rng);
  return () => {
    const now = value;
    value = keep * value + sd * Math.sqrt(1 - keep * keep) * standardNormal(rng);
    return now;
  };
}

/** Raw fixes from plain lists, one segment. */
export function fixesOf(
  timeMs: readonly number[],
  latDeg: readonly number[],
  lonDeg: readonly number[],
  receiverSpeedMps: readonly number[] | null = null,
): Fixes {
  return {
    count: timeMs.length,
    timeMs: Float64Array.from(timeMs),
    latDeg: Float64Array.from(latDeg),
    lonDeg: Float64Array.from(lonDeg),
    elevationM: null,
    heartRateBpm: null,
    receiverSpeedMps: receiverSpeedMps === null ? null : Float64Array.from(receiverSpeedMps),
    hdop: null,
    satellites: null,
    segmentStarts: timeMs.length > 0 ? Uint32Array.of(0) : new Uint32Array(0),
  };
}
