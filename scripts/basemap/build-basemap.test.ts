import { readdirSync } from "node:fs";
import { mkdir, mkdtemp, readFile, rm, stat, writeFile } from "node:fs/promises";
import os from "node:os";
import path from "node:path";
import { VectorTile } from "@mapbox/vector-tile";
import { PbfReader } from "pbf";
import { PMTiles, type Source } from "pmtiles";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { openArchive } from "@/lib/server/basemap/archive";
import { type BuildRequest, buildBasemap } from "./build-basemap";
import { columnRowOf } from "./tile-box";

let folder = "";
let request: BuildRequest;
beforeAll(async () => {
  folder = await mkdtemp(path.join(os.tmpdir(), "basemap-"));
  const land = path.join(folder, "land.geo.json");
  // An island of 20 x 20 degrees at the origin with an eight-cornered lake about (5, 5) in it, and one on the date line's west.
  const box = (west: number, south: number, east: number, north: number) => [
    [west, south],
    [east, south],
    [east, north],
    [west, north],
    [west, south],
  ];
  const lake = [[4, 4.5], [4.5, 4], [5.5, 4], [6, 4.5], [6, 5.5], [5.5, 6], [4.5, 6], [4, 5.5], [4, 4.5]]; // prettier-ignore
  const coordinates = [[box(-10, -10, 10, 10), lake], [box(178, -18, 180, -16)]];
  await writeFile(land, JSON.stringify({ type: "MultiPolygon", coordinates }));
  const archive = path.join(folder, "made", "land-9.pmtiles");
  request = { archive, progressFile: `${archive}.progress`, land, maxZoom: 6 };
});
afterAll(() => rm(folder, { recursive: true, force: true }));

describe("buildBasemap", () => {
  it("builds once, clears what dead builds left, and does nothing the second time", async () => {
    const made = path.dirname(request.archive);
    await mkdir(made);
    await writeFile(`${request.archive}.1.part`, "half");
    await writeFile(path.join(made, "land-8.pmtiles"), "older");
    const first = await buildBasemap(request);
    expect(first.outcome).toBe("built");
    expect(readdirSync(made)).toEqual(["land-9.pmtiles"]);
    const { mtimeMs } = await stat(request.archive);
    expect((await buildBasemap(request)).outcome).toBe("there");
    expect((await stat(request.archive)).mtimeMs).toBe(mtimeMs);
  });

  it("leaves no archive and no claim behind when the land cannot be read", async () => {
    const bad = path.join(folder, "bad.geo.json");
    await writeFile(bad, '{"type":"Polygon","coordinates":[[[0,0],');
    const archive = path.join(folder, "bad", "land-9.pmtiles");
    await expect(buildBasemap({ archive, progressFile: `${archive}.progress`, land: bad })).rejects.toThrow(
      "middle",
    );
    expect(readdirSync(path.dirname(archive))).toEqual([]);
  });

  it("is read alike by our reader and by the format's own package, tile for tile", async () => {
    const archive = await openArchive(request.archive);
    const bytes = await readFile(request.archive);
    const source: Source = {
      getKey: () => "made",
      getBytes: async (offset, length) => ({
        data: new Uint8Array(bytes.subarray(offset, offset + length)).buffer,
      }),
    };
    const oracle = new PMTiles(source);
    let withLand = 0;
    for (let z = 0; z <= 6; z += 1) {
      for (let x = 0; x < 2 ** z; x += 1) {
        for (let y = 0; y < 2 ** z; y += 1) {
          const theirs = await oracle.getZxy(z, x, y);
          const ours = await archive.readTile(z, x, y);
          expect(ours === null).toBe(theirs === undefined);
          if (ours && theirs) expect(Buffer.compare(ours, new Uint8Array(theirs.data))).toBe(0);
          withLand += ours ? 1 : 0;
        }
      }
    }
    expect(withLand).toBe(archive.addressedTiles);
    expect((await oracle.getHeader()).maxZoom).toBe(6);
    expect(await archive.readTile(7, 64, 64)).toBeNull();
    await archive.close();
  });

  it("covers exactly the tiles the land reaches, to a tile's buffer", async () => {
    const archive = await openArchive(request.archive);
    const buffer = 128 / 8192;
    // Zoom 6 is 5.625 degrees a column, so -10 to 10 degrees spans columns 30.22 to 33.78: 30 to 33, no buffer touched.
    const west = columnRowOf(-10, 10, 6);
    const east = columnRowOf(10, -10, 6);
    for (let x = 28; x <= 36; x += 1) {
      for (let y = 28; y <= 36; y += 1) {
        const meets =
          x + 1 + buffer > west.x && x - buffer < east.x && y + 1 + buffer > west.y && y - buffer < east.y;
        expect([x, y, (await archive.readTile(6, x, y)) !== null]).toEqual([x, y, meets]);
      }
    }
    await archive.close();
  });

  it("keeps the lake a hole in the tile over its middle", async () => {
    const archive = await openArchive(request.archive);
    const lake = columnRowOf(5, 5, 6);
    const data = await archive.readTile(6, Math.floor(lake.x), Math.floor(lake.y));
    const layer = data && new VectorTile(new PbfReader(data)).layers["land"];
    expect(layer?.length).toBe(1);
    // Outline and lake.
    expect(layer?.feature(0).loadGeometry()).toHaveLength(2);
    await archive.close();
  });

  it("refuses a file that is no archive or is cut short", async () => {
    const none = path.join(folder, "none.pmtiles");
    await writeFile(none, Buffer.alloc(500));
    await expect(openArchive(none)).rejects.toThrow("not an archive");
    const short = path.join(folder, "short.pmtiles");
    await writeFile(short, (await readFile(request.archive)).subarray(0, 200));
    await expect(openArchive(short)).rejects.toThrow("cut short");
  });
});
