import type { Place } from "./place";
import type { Bounds } from "./track-shape";

/** Places up to this share of the track's longer side outside it are shown too. */
const NEAR_SHARE = 0.25;

/** The box to show at first: the whole track, and the named places just beside it. */
export function fitBox(bounds: Bounds, places: readonly Place[]): [number, number, number, number] {
  const [west, south, east, north] = bounds;
  const near = NEAR_SHARE * Math.max(east - west, north - south);
  let box: [number, number, number, number] = [west, south, east, north];
  for (const { lat, lon: given } of places) {
    const lon = given + 360 * Math.round(((west + east) / 2 - given) / 360);
    const beside = lon > west - near && lon < east + near && lat > south - near && lat < north + near;
    if (!beside) continue;
    box = [Math.min(box[0], lon), Math.min(box[1], lat), Math.max(box[2], lon), Math.max(box[3], lat)];
  }
  return box;
}
