import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import { wrapAngle, type CourseColumns } from "./course";
import type { FoilSpan } from "./on-foil";

const RAD = Math.PI / 180;
/** Samples afloat that the waves' axis needs, and how far it may stand from the riding (rad). Trials, no source. */
const SWAY_SAMPLES_MIN = 150;
const SWAY_APART_MAX = 25 * RAD;
const RIDING_S_MIN = 60;

/** The mean course while accelerating on foil, weighted by the acceleration; null under a minute of it. */
function ridingCourse(
  track: SmoothedTrack,
  columns: CourseColumns,
  spans: readonly FoilSpan[],
): number | null {
  const second = Math.round(1000 / track.stepMs);
  let x = 0;
  let y = 0;
  let samples = 0;
  for (const span of spans) {
    const last = Math.min(span.end - 3 * second, track.count - second - 1);
    for (let i = Math.ceil(span.start) + 5 * second; i < last; i++) {
      const gain = ((track.speedMps[i + second] ?? 0) - (track.speedMps[i - second] ?? 0)) / 2 + 0.05;
      if (gain <= 0) continue;
      x += gain * Math.sin(columns.course[i] ?? 0);
      y += gain * Math.cos(columns.course[i] ?? 0);
      samples++;
    }
  }
  return (samples * track.stepMs) / 1000 < RIDING_S_MIN ? null : Math.atan2(x, y);
}

/** Axis (rad, either way) of the waves' to-and-fro while floating, off foil and away from it; null with too little. */
function swayAxis(track: SmoothedTrack, onFoil: ArrayLike<number>): number | null {
  const second = Math.round(1000 / track.stepMs);
  const half = 4 * second;
  const stride = Math.max(1, Math.round(500 / track.stepMs));
  let eastEast = 0;
  let northNorth = 0;
  let eastNorth = 0;
  let samples = 0;
  for (let i = 2 * half; i < track.count - 2 * half; i += stride) {
    const near = onFoil[i - half] === 1 || onFoil[i] === 1 || onFoil[i + half] === 1;
    if (near || track.onWater[i] !== 1 || (track.gapS[i] ?? 0) > 0) continue;
    const timeS = (2 * half * track.stepMs) / 1000;
    const east = (track.vxMps[i] ?? 0) - ((track.xM[i + half] ?? 0) - (track.xM[i - half] ?? 0)) / timeS;
    const north = (track.vyMps[i] ?? 0) - ((track.yM[i + half] ?? 0) - (track.yM[i - half] ?? 0)) / timeS;
    eastEast += east * east;
    northNorth += north * north;
    eastNorth += east * north;
    samples++;
  }
  if (samples < SWAY_SAMPLES_MIN) return null;
  return Math.PI / 2 - 0.5 * Math.atan2(2 * eastNorth, eastEast - northNorth);
}

/**
 * Where the wind comes from (degrees true) by a downwinder, or null with under a minute of riding.
 *
 * Bumps run before the wind, and a rider speeds up along them: the mean course while accelerating, drawn half way
 * to the axis in which the waves sway a floating rider when the two are within 25 degrees. Good to about 6-10
 * degrees (trials on modelled sessions, no published source).
 */
export function windFromBumps(
  track: SmoothedTrack,
  columns: CourseColumns,
  spans: readonly FoilSpan[],
  onFoil: ArrayLike<number>,
): number | null {
  const riding = ridingCourse(track, columns, spans);
  if (riding === null) return null;
  let from = riding + Math.PI;
  const axis = swayAxis(track, onFoil);
  if (axis !== null) {
    const one = wrapAngle(axis - from);
    const apart = Math.abs(one) < Math.PI / 2 ? one : wrapAngle(one + Math.PI);
    if (Math.abs(apart) < SWAY_APART_MAX) from += apart / 2;
  }
  return (((from / RAD) % 360) + 360) % 360;
}
