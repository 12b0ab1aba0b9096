import { invariant } from "@/lib/errors/invariant";

import { distanceM, LOCAL_STEP_LIMIT_M } from "./distance-m";
import { metresPerDegreeEast, metresPerDegreeNorth, RADIANS_PER_DEGREE } from "./ellipsoid";
import { geodesicLine } from "./geodesic";
import { wrapLongitudeDeg } from "./longitude";

/** East (`xM`) and north (`yM`) coordinates in metres from the first point, one pair a point. */
export type Plane = { readonly xM: Float64Array; readonly yM: Float64Array };

/**
 * The first `count` points of a path laid out on a plane by chaining its steps, each measured on the ellipsoid at its own
 * latitude, so that lengths along the path stay right over tens of kilometres (a plane at one latitude would be
 * 0.2 % off after ten). Not a map projection: two visits to one place may differ by some metres after a long loop.
 * Long and polar steps are scaled to their geodesic length. Degrees in, antimeridian-safe; a point that is not
 * finite makes it and all later ones NaN. Empty input gives empty columns.
 *
 * @throws Error when there are fewer coordinates than `count`.
 * @example
 * Math.round(chainedPlane([0, 1], [0, 0], 2).yM[1]); // 110574
 */
export function chainedPlane(latDeg: ArrayLike<number>, lonDeg: ArrayLike<number>, count: number): Plane {
  invariant(latDeg.length >= count && lonDeg.length >= count, "a latitude and a longitude for every point");
  const xM = new Float64Array(count);
  const yM = new Float64Array(count);
  for (let i = 1; i < count; i++) {
    const lat0 = latDeg[i - 1] ?? NaN;
    const lon0 = lonDeg[i - 1] ?? NaN;
    const lat1 = latDeg[i] ?? NaN;
    const lon1 = lonDeg[i] ?? NaN;
    const mid = 0.5 * (lat0 + lat1);
    let east = wrapLongitudeDeg(lon1 - lon0) * metresPerDegreeEast(mid);
    let north = (lat1 - lat0) * metresPerDegreeNorth(mid);
    if (Math.abs(mid) > 88) {
      const line = geodesicLine(lat0, lon0, lat1, lon1);
      const bearing = line.bearingDeg * RADIANS_PER_DEGREE;
      east = line.distanceM * Math.sin(bearing);
      north = line.distanceM * Math.cos(bearing);
    } else if (Math.abs(east) + Math.abs(north) > LOCAL_STEP_LIMIT_M) {
      const scale = distanceM(lat0, lon0, lat1, lon1) / Math.hypot(east, north);
      east *= scale;
      north *= scale;
    }
    xM[i] = (xM[i - 1] ?? 0) + east;
    yM[i] = (yM[i - 1] ?? 0) + north;
  }
  return { xM, yM };
}
