import { at } from "@/lib/errors/invariant";
import { FLAG_GAP, FLAG_ON_WATER, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";

/** Mean radius of the ellipsoid, metres; good to half a per cent, for drawing only. Source: IUGG 1980 (R1). */
const EARTH_RADIUS_M = 6371008.8;
const DEGREE = Math.PI / 180;

/** West, south, east, north in degrees; east may pass 180 so that it is never below west. */
export type Bounds = readonly [number, number, number, number];

/**
 * What drawing needs of a series, worked out once: longitudes without a jump at the antimeridian (they may
 * pass 180), local metres east and north of the middle, which samples are drawn (on the water, not in a
 * gap, finite), and the bounds of those. `bounds` is null when nothing is drawn.
 */
export type TrackShape = {
  readonly series: SpeedSeries;
  readonly lonDeg: Float64Array;
  readonly eastM: Float64Array;
  readonly northM: Float64Array;
  readonly drawn: Uint8Array;
  readonly bounds: Bounds | null;
};

export function trackShape(series: SpeedSeries): TrackShape {
  const { count, latDeg, lonDeg: given, flags } = series;
  const lonDeg = new Float64Array(count);
  const drawn = new Uint8Array(count);
  let previous = Number.NaN;
  let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity];
  for (let i = 0; i < count; i += 1) {
    const lat = latDeg[i] ?? Number.NaN;
    let lon = given[i] ?? Number.NaN;
    if (Math.abs(lon - previous) > 180) lon += 360 * Math.round((previous - lon) / 360);
    lonDeg[i] = lon;
    // A difference of finite numbers is finite; anything else is not.
    if (!Number.isFinite(lon - lat)) continue;
    previous = lon;
    if (((flags[i] ?? 0) & (FLAG_ON_WATER | FLAG_GAP)) !== FLAG_ON_WATER) continue;
    drawn[i] = 1;
    if (lon < west) west = lon;
    if (lon > east) east = lon;
    if (lat < south) south = lat;
    if (lat > north) north = lat;
  }
  const bounds: Bounds | null = west <= east ? [west, south, east, north] : null;
  const middleLat = bounds ? (south + north) / 2 : 0;
  const middleLon = bounds ? (west + east) / 2 : 0;
  const metresNorth = EARTH_RADIUS_M * DEGREE;
  const metresEast = metresNorth * Math.cos(middleLat * DEGREE);
  const eastM = new Float64Array(count);
  const northM = new Float64Array(count);
  for (let i = 0; i < count; i += 1) {
    eastM[i] = ((lonDeg[i] ?? Number.NaN) - middleLon) * metresEast;
    northM[i] = ((latDeg[i] ?? Number.NaN) - middleLat) * metresNorth;
  }
  return { series, lonDeg, eastM, northM, drawn, bounds };
}

/** First and one-past-last sample inside a stretch; the whole series for null. */
export function sampleRange(series: SpeedSeries, stretch: Stretch | null): { first: number; end: number } {
  if (stretch === null) return { first: 0, end: series.count };
  const indexOf = (timeMs: number) => (timeMs - series.startMs) / series.stepMs;
  const first = Math.min(series.count, Math.max(0, Math.ceil(indexOf(stretch.startMs))));
  const end = Math.min(series.count, Math.max(first, Math.floor(indexOf(stretch.endMs)) + 1));
  return { first, end };
}

/** Position at a moment, between samples by straight line; null outside the series or where it is unknown. */
export function positionAt(shape: TrackShape, timeMs: number): { lonDeg: number; latDeg: number } | null {
  const { series, lonDeg } = shape;
  const place = (timeMs - series.startMs) / series.stepMs;
  if (!(place >= 0 && place <= series.count - 1)) return null;
  const before = Math.floor(place);
  const after = Math.min(series.count - 1, before + 1);
  const share = place - before;
  const lon = at(lonDeg, before) + (at(lonDeg, after) - at(lonDeg, before)) * share;
  const lat = at(series.latDeg, before) + (at(series.latDeg, after) - at(series.latDeg, before)) * share;
  return Number.isFinite(lon) && Number.isFinite(lat) ? { lonDeg: lon, latDeg: lat } : null;
}
