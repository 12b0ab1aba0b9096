import type { Position } from "geojson";
import GeoJSONVT from "geojson-vt";
import { at } from "@/lib/errors/invariant";
import { type Box, boxesMeet, boxHolds, boxOf, clipRing, type Ring } from "./clip-ring";
import { encodeTile, EXTENT } from "./encode-tile";
import type { LandRings } from "./read-land";
import { tileBox } from "./tile-box";

export const MAX_ZOOM = 8;
/** The world is cut cell by cell at this zoom: indexing all of it at once takes gigabytes. */
const CELL_ZOOM = 4;
/** Units of land kept beyond a tile's sides, so that a drawn outline never shows a tile's edge. */
const BUFFER = 128;
/** A quarter of a pixel of a 512-pixel tile, below the largest zoom; there every position is kept. */
const TOLERANCE = 4;
/** Degrees; a tenth of what a pixel of zoom 3 covers at the equator. */
const COARSE_STEP_DEG = 0.01;

export type LandTile = {
  readonly z: number;
  readonly x: number;
  readonly y: number;
  readonly data: Uint8Array;
};

export type CutOptions = {
  readonly maxZoom?: number;
  /** Which cells of zoom 4 to cut; all unless said. Zooms below are cut from the whole world in any case. */
  readonly cells?: (x: number, y: number) => boolean;
  /** Called with the share done, 0 to 1. */
  readonly progress?: (share: number) => Promise<void>;
};

/** Cuts land into vector tiles from zoom 0 on, cell by cell, handing over each tile that has land. */
export async function cutLand(
  land: LandRings,
  emit: (tile: LandTile) => void,
  options: CutOptions = {},
): Promise<void> {
  const { maxZoom = MAX_ZOOM, cells = () => true, progress = async () => undefined } = options;
  const boxes = ringBoxes(land);
  const coarseMaxZoom = Math.min(maxZoom, CELL_ZOOM - 1);
  cutPolygons(coarsePolygons(land, boxes), { minZoom: 0, indexMaxZoom: coarseMaxZoom, maxZoom }, emit);
  if (maxZoom < CELL_ZOOM) return;
  const side = 2 ** CELL_ZOOM;
  for (let x = 0; x < side; x += 1) {
    for (let y = 0; y < side; y += 1) {
      if (!cells(x, y)) continue;
      const box = tileBox(CELL_ZOOM, x, y, (1.5 * BUFFER) / EXTENT);
      const within = (tile: { z: number; x: number; y: number }) =>
        tile.x >> (tile.z - CELL_ZOOM) === x && tile.y >> (tile.z - CELL_ZOOM) === y;
      cutPolygons(
        clippedPolygons(land, boxes, box),
        { minZoom: CELL_ZOOM, indexMaxZoom: maxZoom, maxZoom },
        (tile) => {
          if (within(tile)) emit(tile);
        },
      );
    }
    await progress((x + 1) / side);
  }
}

type ZoomRange = { readonly minZoom: number; readonly indexMaxZoom: number; readonly maxZoom: number };

function cutPolygons(polygons: Position[][][], zooms: ZoomRange, emit: (tile: LandTile) => void): void {
  if (polygons.length === 0) return;
  const { minZoom, indexMaxZoom, maxZoom } = zooms;
  const index = new GeoJSONVT(
    { type: "MultiPolygon", coordinates: polygons },
    { maxZoom, indexMaxZoom, indexMaxPoints: 0, extent: EXTENT, buffer: BUFFER, tolerance: TOLERANCE },
  );
  for (const { z, x, y } of index.tileCoords) {
    if (z < minZoom) continue;
    const tile = index.getTile(z, x, y);
    const data = tile === null ? null : encodeTile(tile);
    if (data !== null) emit({ z, x, y, data });
  }
}

function ringAt(land: LandRings, ring: number): Float64Array {
  return land.lonLat.subarray(2 * at(land.ringStarts, ring), 2 * at(land.ringStarts, ring + 1));
}

/** West, south, east, north of every ring, four numbers each: objects would take a hundred megabytes. */
function ringBoxes(land: LandRings): Float64Array {
  const count = land.ringStarts.length - 1;
  const boxes = new Float64Array(4 * count);
  for (let ring = 0; ring < count; ring += 1) {
    const { west, south, east, north } = boxOf(ringAt(land, ring));
    boxes.set([west, south, east, north], 4 * ring);
  }
  return boxes;
}

function boxAt(boxes: Float64Array, ring: number): Box {
  return {
    west: at(boxes, 4 * ring),
    south: at(boxes, 4 * ring + 1),
    east: at(boxes, 4 * ring + 2),
    north: at(boxes, 4 * ring + 3),
  };
}

function clippedPolygons(land: LandRings, boxes: Float64Array, cell: Box): Position[][][] {
  return polygonsBy(land, (ring) => {
    const box = boxAt(boxes, ring);
    if (!boxesMeet(cell, box)) return null;
    const whole = ringAt(land, ring);
    return boxHolds(cell, box) ? whole : clipRing(whole, cell);
  });
}

function coarsePolygons(land: LandRings, boxes: Float64Array): Position[][][] {
  return polygonsBy(land, (ring) => {
    const box = boxAt(boxes, ring);
    if (Math.max(box.east - box.west, box.north - box.south) < 3 * COARSE_STEP_DEG) return null;
    return thinned(ringAt(land, ring), COARSE_STEP_DEG);
  });
}

function polygonsBy(land: LandRings, keep: (ring: number) => Ring | null): Position[][][] {
  const polygons: Position[][][] = [];
  for (let polygon = 0; polygon + 1 < land.polygonStarts.length; polygon += 1) {
    const first = at(land.polygonStarts, polygon);
    const outline = keep(first);
    if (outline === null) continue;
    const rings = [positions(outline)];
    for (let ring = first + 1; ring < at(land.polygonStarts, polygon + 1); ring += 1) {
      const hole = keep(ring);
      if (hole !== null) rings.push(positions(hole));
    }
    polygons.push(rings);
  }
  return polygons;
}

function positions(ring: Ring): Position[] {
  const list: Position[] = new Array(ring.length / 2);
  for (let i = 0; i < list.length; i += 1) list[i] = [at(ring, 2 * i), at(ring, 2 * i + 1)];
  return list;
}

/** Drops positions nearer than `stepDeg` to the last one kept; ends stay, so the ring stays closed. */
function thinned(ring: Ring, stepDeg: number): Ring | null {
  const kept: number[] = [at(ring, 0), at(ring, 1)];
  for (let i = 2; i + 1 < ring.length; i += 2) {
    const lon = at(ring, i);
    const lat = at(ring, i + 1);
    const last = kept.length - 2;
    const far = Math.hypot(lon - at(kept, last), lat - at(kept, last + 1)) >= stepDeg;
    if (far || i + 2 === ring.length) kept.push(lon, lat);
  }
  return kept.length >= 8 ? kept : null;
}
