import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import { wrapAngle, type CourseColumns } from "./course";
import type { FoilSpan } from "./on-foil";

const RAD = Math.PI / 180;
/** A leg: slower turning than this (rad/s), faster than this (m/s). Trials, no source. */
const LEG_RATE_MAX = 8 * RAD;
const LEG_MPS_MIN = 3;
/** A swing of the bow: turning faster than this until slower than that (rad/s), by this much in all (rad). */
const SWING_RATE_MIN = 12 * RAD;
const SWING_TOTAL_MIN = 60 * RAD;
/** Nobody makes way closer to the wind than this; few run straight before it (degrees). Common practice, no source. */
const NO_GO_DEG = 38;
const DEAD_DEG = 22;
/** Waiting in the water: slower than this (m/s), carried by less than that. Common practice, no source. */
const AFLOAT_MPS_MAX = 1.6;
const DRIFT_MPS_MAX = 0.8;
/** An uneven recorder writes straight ways in steps of some seconds (s): they are legs, not holes. Common practice, no source. */
const LONG_STEP_S = 8;
/** Fewer seconds of legs say nothing. */
const LEGS_S_MIN = 60;

/** Seconds of legs by course, one bin a degree, smoothed by a bell of 5 degrees. */
function legsByCourse(
  track: SmoothedTrack,
  columns: CourseColumns,
  spans: readonly FoilSpan[],
): Float64Array {
  const seconds = new Float64Array(360);
  for (const span of spans) {
    for (let i = Math.ceil(span.start); i <= span.end; i++) {
      const steady = Math.abs(columns.rate[i] ?? 0) < LEG_RATE_MAX && (track.speedMps[i] ?? 0) > LEG_MPS_MIN;
      if (!steady || (track.gapS[i] ?? 0) > LONG_STEP_S) continue;
      const bin = (Math.round((columns.course[i] ?? 0) / RAD) + 360) % 360;
      seconds[bin] = (seconds[bin] ?? 0) + track.stepMs / 1000;
    }
  }
  const smooth = new Float64Array(360);
  for (let i = 0; i < 360; i++) {
    for (let j = -15; j <= 15; j++) {
      const bin = (i + j + 360) % 360;
      smooth[bin] = (smooth[bin] ?? 0) + ((seconds[i] ?? 0) * Math.exp((-j * j) / 50)) / 12.5;
    }
  }
  return smooth;
}

/** The middle courses (rad) of the big swings on foil. */
function swings(track: SmoothedTrack, columns: CourseColumns, spans: readonly FoilSpan[]): number[] {
  const { course, rate } = columns;
  const middles: number[] = [];
  for (const span of spans) {
    let i = Math.ceil(span.start);
    while (i <= span.end) {
      if (Math.abs(rate[i] ?? 0) <= SWING_RATE_MIN) {
        i++;
        continue;
      }
      const side = Math.sign(rate[i] ?? 0);
      let x = 0;
      let y = 0;
      let total = 0;
      while (i <= span.end && (rate[i] ?? 0) * side > LEG_RATE_MAX) {
        x += Math.sin(course[i] ?? 0);
        y += Math.cos(course[i] ?? 0);
        total += Math.abs(((rate[i] ?? 0) * track.stepMs) / 1000);
        i++;
      }
      if (total > SWING_TOTAL_MIN) middles.push(Math.atan2(x, y));
    }
  }
  return middles;
}

type Drift = { readonly fromRad: number; readonly speedMps: number };

/** Where the wind comes from by the way a waiting rider is carried, or null when nobody waited. */
function waitingDrift(track: SmoothedTrack, onFoil: ArrayLike<number>): Drift | null {
  const half = Math.round(6000 / track.stepMs);
  const stride = Math.max(1, Math.round(1000 / track.stepMs));
  let east = 0;
  let north = 0;
  let seen = 0;
  for (let i = half; i < track.count - half; i += stride) {
    let afloat = true;
    for (let j = i - half; afloat && j <= i + half; j += stride) {
      afloat =
        track.onWater[j] === 1 &&
        onFoil[j] !== 1 &&
        (track.gapS[j] ?? 0) <= LONG_STEP_S &&
        (track.speedMps[j] ?? 0) <= AFLOAT_MPS_MAX;
    }
    if (!afloat) continue;
    const timeS = (2 * half * track.stepMs) / 1000;
    const dx = ((track.xM[i + half] ?? 0) - (track.xM[i - half] ?? 0)) / timeS;
    const dy = ((track.yM[i + half] ?? 0) - (track.yM[i - half] ?? 0)) / timeS;
    if (Math.hypot(dx, dy) > DRIFT_MPS_MAX) continue;
    east += dx;
    north += dy;
    seen++;
  }
  if (seen <= 10) return null;
  return { fromRad: Math.atan2(-east, -north), speedMps: Math.hypot(east, north) / seen };
}

/** How well a direction explains the legs: mirror symmetry, and no legs close to the wind or dead before it. */
function legScore(legs: Float64Array, total: number, fromDeg: number): number {
  const at = (deg: number): number => legs[(((fromDeg + deg) % 360) + 360) % 360] ?? 0;
  let mirrored = 0;
  for (let d = 1; d < 180; d++) mirrored += Math.sqrt(at(d) * at(-d));
  let close = 0;
  for (let d = -NO_GO_DEG; d <= NO_GO_DEG; d++) close += at(d);
  let dead = 0;
  for (let d = -DEAD_DEG; d <= DEAD_DEG; d++) dead += at(180 + d);
  return (2 * mirrored - 3 * close - 1.5 * dead) / total;
}

/**
 * Where the wind comes from (degrees true) by the legs of a rider who sails back and forth, or null with under a minute
 * of legs.
 *
 * The axis by mirror symmetry of the time spent on each course; which end of it is upwind by the cone in which
 * nobody makes way, by the drift of a waiting rider, and by gybes outnumbering tacks (a bow swings through the lee side
 * more often). In: the track, course columns, spans on foil and their mask. Method and weights: trials on modelled
 * sessions, no published source; medians there 1-3 degrees.
 */
export function windFromLegs(
  track: SmoothedTrack,
  columns: CourseColumns,
  spans: readonly FoilSpan[],
  onFoil: ArrayLike<number>,
): number | null {
  const legs = legsByCourse(track, columns, spans);
  const total = legs.reduce((sum, seconds) => sum + seconds, 0);
  if (total < LEGS_S_MIN) return null;
  const drift = waitingDrift(track, onFoil);
  const middles = swings(track, columns, spans);
  const score = (fromDeg: number): number => {
    let value = legScore(legs, total, fromDeg);
    const from = fromDeg * RAD;
    if (drift) value += 0.5 * Math.min(1, drift.speedMps / 0.15) * Math.cos(wrapAngle(from - drift.fromRad));
    if (middles.length > 3) {
      value -= (0.5 * middles.reduce((sum, middle) => sum + Math.cos(middle - from), 0)) / middles.length;
    }
    return value;
  };
  let best = 0;
  let bestScore = -Infinity;
  for (let fromDeg = 0; fromDeg < 360; fromDeg++) {
    const value = score(fromDeg);
    if (value > bestScore) {
      best = fromDeg;
      bestScore = value;
    }
  }
  return best;
}
