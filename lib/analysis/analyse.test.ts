import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Fixes } from "@/lib/track/fixes";
import { analyse } from "./analyse";
import { summarise } from "./summarise";

const START_MS = Date.UTC(2025, 5, 14, 9);

function fixesOf(rows: readonly (readonly [timeS: number, lat: number, lon: number])[]): Fixes {
  return {
    count: rows.length,
    timeMs: Float64Array.from(rows, ([timeS]) => START_MS + timeS * 1000),
    latDeg: Float64Array.from(rows, ([, lat]) => lat),
    lonDeg: Float64Array.from(rows, ([, , lon]) => lon),
    elevationM: null,
    heartRateBpm: null,
    receiverSpeedMps: null,
    hdop: null,
    satellites: null,
    segmentStarts: Uint32Array.from(rows.length > 0 ? [0] : []),
  };
}

/** Ten minutes northwards at 1 Hz along a meridian: 4 min flying over bumps, 2 min afloat, 4 min flying. */
function session(lonDeg: number): Fixes {
  const rows: [number, number, number][] = [];
  let northM = 0;
  for (let t = 0; t < 760; t++) {
    const flying = (t >= 90 && t < 330) || (t >= 450 && t < 690);
    northM += flying ? 6.5 + 1.2 * Math.sin((2 * Math.PI * t) / 9) : 1;
    const lon = lonDeg + 1e-6 * Math.sin(t);
    rows.push([t, 56 + northM / 111_300, lon > 180 ? lon - 360 : lon]);
  }
  return fixesOf(rows);
}

const options = { discipline: "downwind", trim: null, minimumFlyingSpeedMps: null } as const;

describe("analyse", () => {
  it("finds two flights, and the same ones across the antimeridian", () => {
    const here = analyse(session(9), options);
    const there = analyse(session(180), options);
    expect(here.segments).toHaveLength(2);
    expect(there.segments.map((segment) => Math.round(segment.distanceM))).toEqual(
      here.segments.map((segment) => Math.round(segment.distanceM)),
    );
    expect(there.rawLengthM).toBeCloseTo(here.rawLengthM, 0);
  });

  it("keeps to the rider's own ends: window, segments and bests lie inside", () => {
    const trim = { startMs: START_MS + 150_000, endMs: START_MS + 600_000 };
    const analysis = analyse(session(9), { ...options, trim });
    expect(analysis.window).toEqual(trim);
    expect(analysis.segments).toHaveLength(2);
    const parts = [...analysis.segments, ...analysis.bumpRides, ...analysis.figures.bestTens];
    for (const part of parts) {
      expect(part.startMs).toBeGreaterThanOrEqual(trim.startMs);
      expect(part.endMs).toBeLessThanOrEqual(trim.endMs);
    }
  });

  it("gives the same figures twice, and again from the series over the window", () => {
    const once = analyse(session(9), options);
    expect(analyse(session(9), options).figures).toEqual(once.figures);
    expect(summarise(once, once.window)).toEqual(once.figures);
  });

  it.each([
    ["no fix", []],
    ["one fix", [[0, 56, 9]]],
    [
      "two fixes at one time",
      [
        [0, 56, 9],
        [0, 56, 9],
      ],
    ],
    [
      "two fixes",
      [
        [0, 56, 9],
        [1, 56.00001, 9],
      ],
    ],
    [
      "a place at the pole",
      [
        [0, 90, 0],
        [1, 90, 90],
        [2, 89.9999, 180],
      ],
    ],
  ] as [string, [number, number, number][]][])("answers with zeros and reasons for %s", (_name, rows) => {
    const { figures, segments } = analyse(fixesOf(rows), options);
    expect(segments).toEqual([]);
    expect(figures.onFoilTimeS).toBe(0);
    expect(figures.bumps).toBeNull();
    expect(figures.bests.nm).toEqual({ withheld: "too_short" });
  });

  it("never throws and never gives a figure that is not finite, whatever the fixes", () => {
    const row = fc.tuple(
      fc.integer({ min: -50, max: 400 }),
      fc.double({ min: -90, max: 90, noNaN: true }),
      fc.double({ min: -180, max: 180, noNaN: true }),
    );
    const near = fc.tuple(
      fc.integer({ min: 0, max: 900 }),
      fc.double({ min: 55.99, max: 56.01, noNaN: true }),
      fc.double({ min: 8.99, max: 9.01, noNaN: true }),
    );
    const rows = fc.oneof(fc.array(row, { maxLength: 80 }), fc.array(near, { maxLength: 200 }));
    fc.assert(
      fc.property(rows, fc.constantFrom("downwind", "wing", "other"), (values, discipline) => {
        const { figures } = analyse(fixesOf(values), { ...options, discipline });
        const numbers = Object.entries(figures).filter(
          ([key, value]) => typeof value === "number" && key !== "startMs" && key !== "endMs",
        );
        for (const [key, value] of numbers) expect([key, Number.isFinite(value)]).toEqual([key, true]);
        expect(figures.onFoilDistanceM).toBeLessThanOrEqual(figures.waterDistanceM + 1);
      }),
      { seed: 31, numRuns: 120 },
    );
  });
});
