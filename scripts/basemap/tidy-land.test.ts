import { describe, expect, it } from "vitest";
import { LandReader } from "./read-land";
import { tidyLand } from "./tidy-land";

function land(polygons: number[][][][]) {
  const reader = new LandReader();
  reader.push(Buffer.from(JSON.stringify({ type: "MultiPolygon", coordinates: polygons })));
  return reader.finish();
}

const outline = [[0, 0], [9, 0], [9, 9], [0, 9], [0, 0]]; // prettier-ignore
/** Seven corners: the fewest a kept hole has. */
const lake = [[2, 2], [3, 1], [4, 2], [4.5, 3], [4, 4], [3, 4.5], [2, 4], [2, 2]]; // prettier-ignore
const remain = [[5, 5], [6, 5], [6, 6], [5, 5]]; // prettier-ignore
const slantedIslet = [[20, 20], [21, 20.1], [20.5, 21], [20, 20]]; // prettier-ignore
const straightIslet = [[30, 30], [31, 30], [30.5, 31], [30, 30]]; // prettier-ignore

describe("tidyLand", () => {
  it("drops grid remains and keeps lakes, land and islets of any other shape", () => {
    const tidy = tidyLand(land([[outline, remain, lake], [slantedIslet], [straightIslet]]));
    expect([...tidy.polygonStarts]).toEqual([0, 2, 3]);
    expect([...tidy.ringStarts]).toEqual([0, 5, 13, 17]);
    expect([...tidy.lonLat]).toEqual([outline, lake, slantedIslet].flat(2));
  });
});
