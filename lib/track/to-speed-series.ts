import { RADIANS_PER_DEGREE } from "@/lib/geo/ellipsoid";
import { wrapBearingDeg } from "@/lib/geo/longitude";

import type { SmoothedTrack } from "./smoothed-track";
import { FLAG_GAP, FLAG_ON_FOIL, FLAG_ON_WATER, type SpeedSeries } from "./speed-series";

const STEP_MS = 1000;
/** A fine clock quicker than this is the recording's own. */
const FINE_STEP_MS = 250;
/** Below this the course is noise. */
const COURSE_MPS_MIN = 0.5;
/** Longest hole that is bridged for distance, seconds. */
const BRIDGED_S = 30;

/**
 * The smoothed track on the clock that is stored, sent and drawn: every second, or the fine clock's own step when the recording
 * is faster than 1 Hz. `onFoil` has one element a fine sample. The cumulated way comes from all fine samples by
 * the trapezoid rule over the loose speed, so it does not depend on the coarser clock; it stands still off the water and in holes longer than 30 s.
 * An empty track gives an empty series.
 */
export function toSpeedSeries(track: SmoothedTrack, onFoil: ArrayLike<number>): SpeedSeries {
  const wantedMs = track.stepMs < FINE_STEP_MS ? track.stepMs : STEP_MS;
  const stride = Math.max(1, Math.round(wantedMs / track.stepMs));
  const offset = stride > 1 ? alignedOffset(track, stride) : 0;
  const count = track.count > offset ? Math.floor((track.count - 1 - offset) / stride) + 1 : 0;
  const way = cumulatedWay(track);
  const out = {
    startMs: track.startMs + offset * track.stepMs,
    stepMs: stride * track.stepMs,
    count,
    latDeg: new Float64Array(count),
    lonDeg: new Float64Array(count),
    speedMps: new Float32Array(count),
    speedSeMps: new Float32Array(count),
    courseDeg: new Float32Array(count),
    distanceM: new Float64Array(count),
    heartRateBpm: track.heartRateBpm === null ? null : new Float32Array(count),
    flags: new Uint8Array(count),
  };
  for (let i = 0; i < count; i++) {
    const k = offset + i * stride;
    const speed = track.speedMps[k] as number;
    out.latDeg[i] = track.latDeg[k] as number;
    out.lonDeg[i] = track.lonDeg[k] as number;
    out.speedMps[i] = speed;
    out.speedSeMps[i] = track.speedSeMps[k] as number;
    out.courseDeg[i] = speed < COURSE_MPS_MIN ? NaN : courseDeg(track, k);
    out.distanceM[i] = way[k] as number;
    if (out.heartRateBpm && track.heartRateBpm) out.heartRateBpm[i] = track.heartRateBpm[k] as number;
    const water = track.onWater[k] ? FLAG_ON_WATER : 0;
    const foil = onFoil[k] ? FLAG_ON_FOIL : 0;
    out.flags[i] = ((track.gapS[k] as number) > 0 ? FLAG_GAP : 0) | water | foil;
  }
  return out;
}

/** First sample on a whole step, so that one-second series stand on whole seconds. */
function alignedOffset(track: SmoothedTrack, stride: number): number {
  const stepMs = stride * track.stepMs;
  const late = ((track.startMs % stepMs) + stepMs) % stepMs;
  return late === 0 ? 0 : Math.round((stepMs - late) / track.stepMs);
}

function courseDeg(track: SmoothedTrack, k: number): number {
  return wrapBearingDeg(Math.atan2(track.vxMps[k] as number, track.vyMps[k] as number) / RADIANS_PER_DEGREE);
}

function cumulatedWay(track: SmoothedTrack): Float64Array {
  const way = new Float64Array(track.count);
  const halfS = track.stepMs / 2000;
  for (let k = 1; k < track.count; k++) {
    const counts = track.onWater[k] && track.onWater[k - 1] && (track.gapS[k] as number) <= BRIDGED_S;
    const step = halfS * ((track.speedMpsLoose[k] as number) + (track.speedMpsLoose[k - 1] as number));
    way[k] = (way[k - 1] as number) + (counts ? step : 0);
  }
  return way;
}
