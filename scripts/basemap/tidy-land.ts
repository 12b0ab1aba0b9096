import { at } from "@/lib/errors/invariant";
import type { LandRings } from "./read-land";

/**
 * The source was put together from squares of 360/8192 degrees, each simplified on its own to 100 m, with the
 * waters inside a square left out. Of a lake, river or bay that crosses a square's side, a triangle or a small
 * star of sides along the grid is left: 840 000 holes, nine tenths of which are such remains and look like
 * torn paper on the map. What has fewer corners than this is not the shape of any water.
 */
const HOLE_CORNERS_MIN = 7;

/** Leaves out holes that are remains of the source's grid, and three-cornered islands with a side along it. */
export function tidyLand(land: LandRings): LandRings {
  const ringStarts: number[] = [];
  const polygonStarts: number[] = [];
  const lonLat = new Float64Array(land.lonLat.length);
  let filled = 0;
  const copy = (ring: number) => {
    const part = land.lonLat.subarray(2 * at(land.ringStarts, ring), 2 * at(land.ringStarts, ring + 1));
    ringStarts.push(filled / 2);
    lonLat.set(part, filled);
    filled += part.length;
  };
  for (let polygon = 0; polygon + 1 < land.polygonStarts.length; polygon += 1) {
    const outline = at(land.polygonStarts, polygon);
    if (corners(land, outline) <= 3 && hasStraightSide(land, outline)) continue;
    polygonStarts.push(ringStarts.length);
    copy(outline);
    for (let ring = outline + 1; ring < at(land.polygonStarts, polygon + 1); ring += 1) {
      if (corners(land, ring) >= HOLE_CORNERS_MIN) copy(ring);
    }
  }
  polygonStarts.push(ringStarts.length);
  ringStarts.push(filled / 2);
  return {
    lonLat: lonLat.slice(0, filled),
    ringStarts: Uint32Array.from(ringStarts),
    polygonStarts: Uint32Array.from(polygonStarts),
  };
}

function corners(land: LandRings, ring: number): number {
  return at(land.ringStarts, ring + 1) - at(land.ringStarts, ring) - 1;
}

/** Whether a side runs exactly along a meridian or a parallel. */
function hasStraightSide(land: LandRings, ring: number): boolean {
  for (let i = at(land.ringStarts, ring); i + 1 < at(land.ringStarts, ring + 1); i += 1) {
    if (at(land.lonLat, 2 * i) === at(land.lonLat, 2 * i + 2)) return true;
    if (at(land.lonLat, 2 * i + 1) === at(land.lonLat, 2 * i + 3)) return true;
  }
  return false;
}
