import { fromGeojsonVt } from "vt-pbf";
import type GeoJSONVT from "geojson-vt";

export const LAND_LAYER = "land";
/** Units across a tile. Twice the customary 4096: at zoom 8 a unit is 10 m at 57 degrees, the source's own step. */
export const EXTENT = 8192;

type CutTile = NonNullable<ReturnType<GeoJSONVT["getTile"]>>;

/** A tile as Mapbox Vector Tile 2.1 bytes with the one layer of land, or null when it has none. */
export function encodeTile(tile: CutTile): Uint8Array | null {
  if (tile.features.length === 0) return null;
  return fromGeojsonVt({ [LAND_LAYER]: tile }, { version: 2, extent: EXTENT });
}
