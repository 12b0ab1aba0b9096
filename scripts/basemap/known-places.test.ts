import { createRequire } from "node:module";
import { VectorTile } from "@mapbox/vector-tile";
import { PbfReader } from "pbf";
import { beforeAll, describe, expect, it } from "vitest";
import { cutLand } from "./cut-land";
import { readLand } from "./read-land";
import { tidyLand } from "./tidy-land";
import { columnRowOf } from "./tile-box";

/**
 * Positions in decimal degrees.
 * Lake Superior: NDBC buoys 45001 and 45006 as printed by Lake Superior Magazine ("Lake Superior heating up");
 * Lake Michigan: station 45174 as printed by the Illinois Paddling Council (2015).
 * Sea: NDBC stations 41012 (off Florida) and 46053 (Santa Barbara Channel), position list of December 2002,
 * NOAA NCEI accession 0000886.
 * Land: Flinders Peak and Buninyong, Geocentric Datum of Australia Technical Manual (ICSM), worked example.
 * The spit of Skagen and the sea beside it: read off no list, from memory; both are kilometres from a coast.
 */
const PLACES = [
  ["Lake Superior, buoy 45001", 48.064, -87.777, "water"],
  ["Lake Superior, buoy 45006", 47.335, -89.793, "water"],
  ["Lake Michigan, station 45174", 42.135, -87.655, "water"],
  ["Atlantic off Florida, station 41012", 30, -80.5, "water"],
  ["Santa Barbara Channel, station 46053", 34.2361, -119.8467, "water"],
  ["Flinders Peak", -37.95103341667, 144.42486788889, "land"],
  ["Buninyong", -37.65282113889, 143.92649552778, "land"],
  ["Vendsyssel, inland", 57.3, 10.1, "land"],
  ["Jammerbugt, at sea", 57.3, 9.3, "water"],
] as const;

const tiles = new Map<string, Uint8Array>();
const key = (z: number, x: number, y: number) => `${z}/${x}/${y}`;

beforeAll(async () => {
  const file = createRequire(import.meta.url).resolve("@geo-maps/earth-lands-100m/map.geo.json");
  const cells = new Set(
    PLACES.map(([, lat, lon]) => {
      const { x, y } = columnRowOf(lon, lat, 4);
      return `${Math.floor(x)}/${Math.floor(y)}`;
    }),
  );
  await cutLand(tidyLand(await readLand(file)), ({ z, x, y, data }) => tiles.set(key(z, x, y), data), {
    cells: (x, y) => cells.has(`${x}/${y}`),
  });
}, 120_000);

/** Even-odd rule over the rings of the tile (M. Shimrat, 1962, Algorithm 112, CACM 5(8)). */
function isLand(latDeg: number, lonDeg: number, z: number): boolean {
  const { x, y } = columnRowOf(lonDeg, latDeg, z);
  const data = tiles.get(key(z, Math.floor(x), Math.floor(y)));
  const layer = data && new VectorTile(new PbfReader(data)).layers["land"];
  if (!layer) return false;
  const px = (x % 1) * layer.extent;
  const py = (y % 1) * layer.extent;
  let inside = false;
  for (let f = 0; f < layer.length; f += 1) {
    for (const ring of layer.feature(f).loadGeometry()) {
      ring.forEach((p, i) => {
        const q = ring[(i + 1) % ring.length] ?? p;
        if (p.y > py !== q.y > py && px < ((q.x - p.x) * (py - p.y)) / (q.y - p.y) + p.x) inside = !inside;
      });
    }
  }
  return inside;
}

describe("the land of the world", () => {
  it.each(PLACES)("%s (%d, %d) is %s at every closeness", (_name, lat, lon, expected) => {
    for (const z of [3, 5, 8]) expect([z, isLand(lat, lon, z) ? "land" : "water"]).toEqual([z, expected]);
  });
});
