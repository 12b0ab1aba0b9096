/** Semi-major axis of the WGS84 ellipsoid, metres. Source: NGA.STND.0036 (2014), table 3.1. */
export const WGS84_A_M = 6378137;
/** Flattening of the WGS84 ellipsoid. Source: NGA.STND.0036 (2014), table 3.1. */
export const WGS84_F = 1 / 298.257223563;
/** First eccentricity squared, f (2 - f). */
export const WGS84_E2 = WGS84_F * (2 - WGS84_F);
/** Radians in a degree. */
export const RADIANS_PER_DEGREE = Math.PI / 180;

/**
 * Metres in one degree of latitude at a latitude: the radius of curvature in the meridian,
 * M = a (1 - e2) / (1 - e2 sin^2 lat)^(3/2), times a degree. Defined for any finite latitude in degrees; NaN stays NaN.
 * Source: Torge, Geodesy (2001), eq. 4.14.
 *
 * @example
 * Math.round(metresPerDegreeNorth(0)); // 110574
 */
export function metresPerDegreeNorth(latDeg: number): number {
  const s = Math.sin(latDeg * RADIANS_PER_DEGREE);
  const w = 1 - WGS84_E2 * s * s;
  return ((WGS84_A_M * (1 - WGS84_E2)) / (w * Math.sqrt(w))) * RADIANS_PER_DEGREE;
}

/**
 * Metres in one degree of longitude at a latitude: the radius of the parallel, N cos lat with
 * N = a / sqrt(1 - e2 sin^2 lat), times a degree. Zero at the poles; NaN stays NaN.
 * Source: Torge, Geodesy (2001), eq. 4.15.
 *
 * @example
 * Math.round(metresPerDegreeEast(0)); // 111319
 */
export function metresPerDegreeEast(latDeg: number): number {
  const phi = latDeg * RADIANS_PER_DEGREE;
  const s = Math.sin(phi);
  return (WGS84_A_M / Math.sqrt(1 - WGS84_E2 * s * s)) * Math.cos(phi) * RADIANS_PER_DEGREE;
}
