import { gpx, kml, tcx } from "@tmcw/togeojson";
import { DOMParser } from "@xmldom/xmldom";
import fs from "node:fs";
import type { FeatureCollection, Position } from "geojson";
import { describe, expect, it } from "vitest";
import { fixtureBytes, fixturePath, readOk, sharedPath } from "@/tests/support/reading";

type Line = { positions: Position[]; times: string[]; heart: (number | null)[] | undefined };

/** Every line with times that the library finds in the whole document, read by a whole DOM. */
function oracleLines(convert: (document: Document) => FeatureCollection, text: string): Line[] {
  const document = new DOMParser().parseFromString(text, "text/xml") as unknown as Document;
  return convert(document).features.flatMap(({ geometry, properties }) => {
    const columns = (properties?.["coordinateProperties"] ?? {}) as Record<string, unknown>;
    if (geometry.type === "LineString" && columns["times"]) {
      const { times, heart } = columns as { times: string[]; heart?: (number | null)[] };
      return [{ positions: geometry.coordinates, times, heart }];
    }
    if (geometry.type !== "MultiLineString" || !columns["times"]) return [];
    const { times, heart } = columns as { times: string[][]; heart?: (number | null)[][] };
    return geometry.coordinates.map((positions, index) => ({
      positions,
      times: times[index] ?? [],
      heart: heart?.[index],
    }));
  });
}

describe("togeojson over a whole DOM is the oracle for files it reads without loss", () => {
  it.each([
    ["gpx/run.gpx", gpx],
    ["gpx/31_08_2019.gpx", gpx],
    ["gpx/Geotag.gpx", gpx],
  ] as const)("%s: positions, elevations, times and heart rates are the same", async (name, convert) => {
    const lines = oracleLines(convert, fs.readFileSync(fixturePath(name), "utf8"));
    const { fixes } = await readOk(fixtureBytes(name));
    expect(fixes.segmentStarts.length).toBe(lines.length);
    expect(fixes.count).toBe(lines.reduce((sum, line) => sum + line.positions.length, 0));
    let row = 0;
    for (const { positions, times, heart } of lines) {
      positions.forEach(([lon, lat, elevation], index) => {
        expect([fixes.lonDeg[row], fixes.latDeg[row]]).toEqual([lon, lat]);
        expect(fixes.elevationM?.[row] ?? Number.NaN).toBe(elevation ?? Number.NaN);
        expect(fixes.timeMs[row]).toBe(Date.parse(times[index] ?? ""));
        expect(fixes.heartRateBpm?.[row] ?? Number.NaN).toBe(heart?.[index] ?? Number.NaN);
        row++;
      });
    }
  });

  it("a TCX file: the same positions and times", async () => {
    const lines = oracleLines(tcx, fs.readFileSync(fixturePath("tcx/two-laps.tcx"), "utf8"));
    const { fixes } = await readOk(fixtureBytes("tcx/two-laps.tcx"));
    expect(lines.flatMap((line) => line.positions.map(([lon]) => lon))).toEqual([...fixes.lonDeg]);
    expect(lines.flatMap((line) => line.times.map((time) => Date.parse(time)))).toEqual([...fixes.timeMs]);
    // The oracle's own list of heart rates closes the gap of second 7 and is one short: ours must not be.
    expect(lines.flatMap((line) => line.heart ?? [])).toHaveLength(fixes.count - 1);
  });

  it("a KML track: the same positions where the oracle has them", async () => {
    const lines = oracleLines(
      (document) => kml(document) as FeatureCollection,
      fs.readFileSync(fixturePath("kml/gx-track.kml"), "utf8"),
    );
    const { fixes } = await readOk(fixtureBytes("kml/gx-track.kml"));
    const whole = (lines[0]?.positions ?? []).filter(([lon]) => Number.isFinite(lon));
    expect(whole.map(([lon, lat, elevation]) => [lon, lat, elevation])).toEqual(
      Array.from(fixes.lonDeg, (lon, row) => [lon, fixes.latDeg[row], fixes.elevationM?.[row]]),
    );
  });
});

type Reference = Record<
  string,
  { reference: Record<"points" | "segments", number> & Record<"first_time" | "last_time", string> }
>;
const realFolder = sharedPath("practice/real");
const hasReal = fs.existsSync(realFolder);

// Recorded tracks that are not part of the project: skipped where they are not at hand.
describe.skipIf(!hasReal)("recorded tracks agree with the reference of two or three other tools", () => {
  const reference = hasReal
    ? (JSON.parse(fs.readFileSync(`${realFolder}/reference.json`, "utf8")) as Reference)
    : {};
  // Source: lxml or gpsbabel counts, see reference.json. togeojson itself loses nothing of these.
  it.each(Object.entries(reference))("%s", async (name, { reference: expected }) => {
    const { fixes, rawSegments } = await readOk(new Uint8Array(fs.readFileSync(`${realFolder}/${name}`)));
    expect([fixes.count, fixes.segmentStarts.length, rawSegments]).toEqual([
      expected.points,
      expected.segments,
      expected.segments,
    ]);
    expect(new Date(fixes.timeMs[0] ?? 0).toISOString()).toBe(expected.first_time);
    expect(new Date(fixes.timeMs[fixes.count - 1] ?? 0).toISOString()).toBe(expected.last_time);
  });
});
