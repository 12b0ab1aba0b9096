import { describe, expect, it } from "vitest";

import { chainedPlane } from "./chained-plane";
import { distanceM } from "./distance-m";
import { destination, type Place } from "./geodesic";

/** A path of steps of 8 m along changing bearings, by the geodesic direct problem. */
function winding(start: Place, steps: number): { lat: number[]; lon: number[] } {
  const lat = [start.latDeg];
  const lon = [start.lonDeg];
  let here = start;
  for (let i = 0; i < steps; i++) {
    here = destination(here, 60 + 50 * Math.sin(i / 20), 8);
    lat.push(here.latDeg);
    lon.push(here.lonDeg);
  }
  return { lat, lon };
}

describe("the chained plane", () => {
  it.each([
    ["at 57 degrees north", { latDeg: 57.1, lonDeg: 9.3 }],
    ["on the equator", { latDeg: -0.01, lonDeg: 30 }],
    ["over the antimeridian", { latDeg: -17, lonDeg: 179.98 }],
  ])("keeps every step's length %s", (_, start) => {
    const { lat, lon } = winding(start, 2000);
    const { xM, yM } = chainedPlane(lat, lon, lat.length);
    let length = 0;
    for (let i = 1; i < lat.length; i++) {
      length += Math.hypot((xM[i] ?? NaN) - (xM[i - 1] ?? NaN), (yM[i] ?? NaN) - (yM[i - 1] ?? NaN));
    }
    // Closed form: 2000 steps of 8 m by construction; 1 ppm is what the metric asks.
    expect(Math.abs(length - 16_000)).toBeLessThan(0.016);
  });

  it("gives a long leg its geodesic length", () => {
    const { xM, yM } = chainedPlane([57, 58], [9, 11], 2);
    expect(Math.hypot(xM[1] ?? NaN, yM[1] ?? NaN)).toBeCloseTo(distanceM(57, 9, 58, 11), 6);
  });

  it("stays finite and true to length at the pole", () => {
    const { xM, yM } = chainedPlane([89.9999, 90, 89.9999], [0, 0, 180], 3);
    expect(Math.hypot((xM[1] ?? NaN) - (xM[0] ?? NaN), (yM[1] ?? NaN) - (yM[0] ?? NaN))).toBeCloseTo(
      11.17,
      1,
    );
    expect(Number.isFinite(xM[2]) && Number.isFinite(yM[2])).toBe(true);
  });

  it("is empty for no points and NaN from a missing one on", () => {
    expect(chainedPlane([], [], 0).xM).toHaveLength(0);
    expect(Array.from(chainedPlane([1, NaN, 1], [1, 1, 1], 3).xM)).toEqual([0, NaN, NaN]);
  });
});
