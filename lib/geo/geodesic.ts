import geographiclib from "geographiclib-geodesic";

import { wrapBearingDeg, wrapLongitudeDeg } from "./longitude";

const { WGS84 } = geographiclib.Geodesic;

/** Distance in metres and the true bearings in degrees [0, 360) at the first and at the second point. */
export type GeodesicLine = {
  readonly distanceM: number;
  readonly bearingDeg: number;
  readonly bearingAtEndDeg: number;
};

/**
 * The shortest line between two points on the WGS84 ellipsoid (inverse problem), exact to about 15 nanometres for
 * any pair, antipodal ones too. Degrees in; latitudes in [-90, 90], any longitude. A coordinate that is not finite
 * gives NaN in all fields. Coincident points have bearing 180 or 0 by the library's convention.
 * Source: Karney, Algorithms for geodesics, J. Geodesy 87 (2013), by the package geographiclib-geodesic.
 *
 * @example
 * Math.round(geodesicLine(0, 0, 0, 1).distanceM); // 111319
 */
export function geodesicLine(
  lat1Deg: number,
  lon1Deg: number,
  lat2Deg: number,
  lon2Deg: number,
): GeodesicLine {
  if (!Number.isFinite(lat1Deg + lon1Deg + lat2Deg + lon2Deg)) {
    return { distanceM: NaN, bearingDeg: NaN, bearingAtEndDeg: NaN };
  }
  const r = WGS84.Inverse(lat1Deg, lon1Deg, lat2Deg, lon2Deg);
  return {
    distanceM: r.s12 ?? NaN,
    bearingDeg: wrapBearingDeg(r.azi1 ?? NaN),
    bearingAtEndDeg: wrapBearingDeg(r.azi2 ?? NaN),
  };
}

/** A place on WGS84, degrees. */
export type Place = { readonly latDeg: number; readonly lonDeg: number };

/**
 * The point reached from a place by going `distanceM` metres along the geodesic that leaves at `bearingDeg` degrees
 * true (direct problem). A value that is not finite gives NaN. Longitude in [-180, 180).
 * Source: Karney, Algorithms for geodesics, J. Geodesy 87 (2013), by the package geographiclib-geodesic.
 *
 * @example
 * Math.round(destination({ latDeg: 0, lonDeg: 179 }, 90, 222639).lonDeg); // -179
 */
export function destination(from: Place, bearingDeg: number, distanceM: number): Place {
  if (!Number.isFinite(from.latDeg + from.lonDeg + bearingDeg + distanceM))
    return { latDeg: NaN, lonDeg: NaN };
  const r = WGS84.Direct(from.latDeg, from.lonDeg, bearingDeg, distanceM);
  return { latDeg: r.lat2 ?? NaN, lonDeg: wrapLongitudeDeg(r.lon2 ?? NaN) };
}
