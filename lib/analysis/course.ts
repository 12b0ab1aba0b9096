import type { SmoothedTrack } from "@/lib/track/smoothed-track";

/**
 * The angle in (-pi, pi] that is the same direction, radians. NaN stays NaN.
 *
 * @example
 * Math.abs(wrapAngle(3 * Math.PI)) === Math.PI; // true
 */
export function wrapAngle(angle: number): number {
  const turned = (angle + Math.PI) % (2 * Math.PI);
  return (turned <= 0 ? turned + 2 * Math.PI : turned) - Math.PI;
}

/** Course over ground (radians, clockwise from north) and its rate (rad/s) of every sample. */
export type CourseColumns = { readonly course: Float64Array; readonly rate: Float64Array };

/** Half of the time over which the rate is taken (s): waves wag the course within it. */
const RATE_HALF_S = 1.5;

/**
 * Course and rate of turn from the smoothed velocities. The rate is the change of course over three seconds; 0 within
 * a second and a half of the ends.
 */
export function courseColumns(track: SmoothedTrack): CourseColumns {
  const course = new Float64Array(track.count);
  const rate = new Float64Array(track.count);
  for (let i = 0; i < track.count; i++) course[i] = Math.atan2(track.vxMps[i] ?? 0, track.vyMps[i] ?? 0);
  const half = Math.max(1, Math.round((RATE_HALF_S * 1000) / track.stepMs));
  const spanS = (2 * half * track.stepMs) / 1000;
  for (let i = half; i < track.count - half; i++) {
    rate[i] = wrapAngle((course[i + half] ?? 0) - (course[i - half] ?? 0)) / spanS;
  }
  return { course, rate };
}
