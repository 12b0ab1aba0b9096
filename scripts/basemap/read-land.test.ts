import { describe, expect, it } from "vitest";
import { LandReader } from "./read-land";

function read(text: string, pieceBytes: number) {
  const reader = new LandReader();
  const bytes = Buffer.from(text);
  for (let i = 0; i < bytes.length; i += pieceBytes) reader.push(bytes.subarray(i, i + pieceBytes));
  const { lonLat, ringStarts, polygonStarts } = reader.finish();
  return { lonLat: [...lonLat], ringStarts: [...ringStarts], polygonStarts: [...polygonStarts] };
}

const square = (west: number, south: number, size: number) => [
  [west, south],
  [west + size, south],
  [west + size, south + size],
  [west, south + size],
  [west, south],
];

describe("LandReader", () => {
  const shapes = {
    type: "GeometryCollection",
    bbox: [-1, -2, 3, 4],
    name: 'a "quoted" [bracket]',
    geometries: [
      { type: "Polygon", coordinates: [square(-1.5, 50.0625, 0.5), square(-1.25, 50.25, 0.125)] },
      { type: "MultiPolygon", coordinates: [[square(170, -40, 2)], [square(-4.7329, 55.525, 1)]] },
    ],
  };

  it.each([1, 7, 4096])("finds the rings JSON.parse finds, whatever the pieces (%i bytes)", (pieceBytes) => {
    const got = read(JSON.stringify(shapes, null, 1), pieceBytes);
    const [polygon, multi] = shapes.geometries;
    const expected = [polygon?.coordinates, multi?.coordinates].flat(Infinity);
    expect(got.lonLat).toEqual(expected);
    expect(got.ringStarts).toEqual([0, 5, 10, 15, 20]);
    expect(got.polygonStarts).toEqual([0, 2, 3, 4]);
  });

  it("ignores heights", () => {
    const text = '{"type":"Polygon","coordinates":[[[0,0,9],[1,0,9],[1,1,9],[0,0,9]]]}';
    expect(read(text, 64).lonLat).toEqual([0, 0, 1, 0, 1, 1, 0, 0]);
  });

  it.each([
    ['{"type":"Polygon","coordinates":[[[0,0],[1,0]', "ends in the middle"],
    ['{"type":"GeometryCollection","geometries":[]}', "no polygons"],
    ['{"type":"Polygon","coordinates":[[[0,0],[x,0]]]}', "unexpected"],
    ['{"type":"Polygon","coordinates":[[[0],[1,0]]]}', "one number"],
    ['{"type":"Polygon","coordinates":[[[0.1234567890123456789,0]]]}', "15 digits"],
  ])("refuses %s", (text, words) => {
    expect(() => read(text, 5)).toThrow(words);
  });
});
