import type { SmoothedTrack } from "@/lib/track/smoothed-track";

/** What a made track may say beside its speed; everything else is quiet: no noise, no gap, on the water. */
export type MadeTrack = {
  readonly stepMs?: number;
  readonly startMs?: number;
  readonly seMps?: number;
  /** Course, degrees true, by time; north when absent. */
  readonly courseDeg?: (timeS: number) => number;
  readonly gapS?: (timeS: number) => number;
  readonly isOnWater?: (timeS: number) => boolean;
};

/** A smoothed track without noise whose speed is the given function of time (s from the start). */
export function smoothedTrackFromSpeed(
  speedMps: (timeS: number) => number,
  lastsS: number,
  made: MadeTrack = {},
): SmoothedTrack {
  const stepMs = made.stepMs ?? 250;
  const count = Math.round((lastsS * 1000) / stepMs) + 1;
  const time = (i: number): number => (i * stepMs) / 1000;
  const column = (value: (i: number) => number): Float64Array =>
    Float64Array.from({ length: count }, (_, i) => value(i));
  const course = (i: number): number => ((made.courseDeg?.(time(i)) ?? 0) * Math.PI) / 180;
  const speed = column((i) => speedMps(time(i)));
  const vxMps = column((i) => (speed[i] ?? 0) * Math.sin(course(i)));
  const vyMps = column((i) => (speed[i] ?? 0) * Math.cos(course(i)));
  const integral = (rate: Float64Array): Float64Array => {
    const sum = new Float64Array(count);
    for (let i = 1; i < count; i++) {
      sum[i] = (sum[i - 1] ?? 0) + (((rate[i - 1] ?? 0) + (rate[i] ?? 0)) * stepMs) / 2000;
    }
    return sum;
  };
  const xM = integral(vxMps);
  const yM = integral(vyMps);
  return {
    startMs: made.startMs ?? Date.UTC(2025, 5, 14, 9),
    stepMs,
    count,
    // Near the equator a degree is about 111,200 m each way: good enough where a test looks at shapes.
    latDeg: yM.map((y) => y / 111200),
    lonDeg: xM.map((x) => x / 111200),
    xM,
    yM,
    vxMps,
    vyMps,
    speedMps: speed,
    speedSeMps: column(() => made.seMps ?? 0),
    speedMpsLoose: Float64Array.from(speed),
    gapS: Float32Array.from({ length: count }, (_, i) => made.gapS?.(time(i)) ?? 0),
    onWater: Uint8Array.from({ length: count }, (_, i) => ((made.isOnWater?.(time(i)) ?? true) ? 1 : 0)),
    heartRateBpm: null,
  };
}
