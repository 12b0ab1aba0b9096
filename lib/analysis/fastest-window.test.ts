import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fastestOverDistance, fastestOverTime, fastestSeparate, rivalSpeeds } from "./fastest-window";
import type { WayCurve } from "./way-curve";

/** A curve through the given speeds, each held for one step. */
function curveOf(speeds: readonly number[], stepMs = 1000): WayCurve {
  const wayM = [0];
  for (const speed of speeds) wayM.push((wayM.at(-1) ?? 0) + (speed * stepMs) / 1000);
  return { startMs: 0, stepMs, wayM: Float64Array.from(wayM), runs: [{ from: 0, to: speeds.length }] };
}

const speeds = fc.array(fc.double({ min: 0.1, max: 15, noNaN: true }), { minLength: 5, maxLength: 40 });

describe("fastestOverTime", () => {
  it("is the mean of the fastest block of a speed that is constant in pieces", () => {
    const found = fastestOverTime(curveOf([2, 2, 8, 9, 8, 2, 2]), 3);
    expect(found).toEqual({ startMs: 2000, endMs: 5000, speedMps: (8 + 9 + 8) / 3 });
  });

  it("lets the ends fall between samples: 2.5 s take the fast block and the faster neighbour's half second", () => {
    const found = fastestOverTime(curveOf([1, 4, 10, 10, 3, 1]), 2.5);
    expect(found?.speedMps).toBeCloseTo((10 + 10 + 0.5 * 4) / 2.5, 12);
    expect(found?.startMs).toBeCloseTo(1500, 9);
  });

  it("is never beaten by a window placed on a grid of a twentieth of a second", () => {
    fc.assert(
      fc.property(speeds, fc.double({ min: 0.3, max: 4, noNaN: true }), (values, timeS) => {
        const curve = curveOf(values);
        const way = (t: number): number => {
          const i = Math.min(values.length - 1, Math.floor(t));
          return (curve.wayM[i] ?? 0) + (t - i) * (values[i] ?? 0);
        };
        const found = fastestOverTime(curve, timeS);
        for (let t = 0; t + timeS <= values.length; t += 0.05) {
          expect((way(t + timeS) - way(t)) / timeS).toBeLessThanOrEqual((found?.speedMps ?? 0) + 1e-9);
        }
      }),
      { seed: 11, numRuns: 60 },
    );
  });

  it("never spans a hole between two runs", () => {
    const curve = {
      ...curveOf([9, 9, 0, 9, 9]),
      runs: [
        { from: 0, to: 2 },
        { from: 3, to: 5 },
      ],
    };
    expect(fastestOverTime(curve, 2)?.speedMps).toBe(9);
    expect(fastestOverTime(curve, 3)).toBeNull();
  });
});

describe("fastestOverDistance", () => {
  it("takes the time of the fast block and goes into its faster neighbour for the rest", () => {
    // 25 m: 20 m in the two fast seconds and 5 m of the neighbour at 5 m/s: 3 s.
    const found = fastestOverDistance(curveOf([2, 5, 10, 10, 4, 2]), 25);
    expect(found?.speedMps).toBeCloseTo(25 / 3, 12);
  });

  it("is never beaten by a window that begins on a grid of a twentieth of a second", () => {
    fc.assert(
      fc.property(speeds, fc.double({ min: 1, max: 20, noNaN: true }), (values, lengthM) => {
        const curve = curveOf(values);
        const total = curve.wayM[values.length] ?? 0;
        const timeOf = (way: number): number => {
          let i = 0;
          while (i + 1 < values.length && (curve.wayM[i + 1] ?? 0) <= way) i++;
          return i + (way - (curve.wayM[i] ?? 0)) / (values[i] ?? 1);
        };
        const found = fastestOverDistance(curve, lengthM);
        for (let way = 0; way + lengthM < total; way += 0.2) {
          const speed = lengthM / (timeOf(way + lengthM) - timeOf(way));
          expect(speed).toBeLessThanOrEqual((found?.speedMps ?? 0) + 1e-9);
        }
      }),
      { seed: 12, numRuns: 60 },
    );
  });

  it("is missing when no run is that long", () => {
    expect(fastestOverDistance(curveOf([3, 3, 3]), 10)).toBeNull();
  });

  it("is never faster for a longer distance or a longer time", () => {
    fc.assert(
      fc.property(speeds, (values) => {
        const curve = curveOf(values);
        // Twice a window holds the half that is at least as fast as the whole.
        const one = fastestOverTime(curve, 2)?.speedMps ?? Infinity;
        const two = fastestOverTime(curve, 4)?.speedMps ?? 0;
        expect(two).toBeLessThanOrEqual(one + 1e-9);
        const short = fastestOverDistance(curve, 3)?.speedMps ?? Infinity;
        const long = fastestOverDistance(curve, 6)?.speedMps ?? 0;
        expect(long).toBeLessThanOrEqual(short + 1e-9);
      }),
      { seed: 13, numRuns: 200 },
    );
  });
});

describe("fastestSeparate and rivalSpeeds", () => {
  it("gives windows in order of speed that do not overlap", () => {
    const found = fastestSeparate(curveOf([1, 9, 9, 1, 7, 7, 1, 8, 8, 1]), 2, 3);
    expect(found.map((window) => window.speedMps)).toEqual([9, 8, 7]);
  });

  it("gives fewer when there is no more room", () => {
    expect(fastestSeparate(curveOf([5, 5, 5, 5, 5]), 2, 5)).toHaveLength(2);
  });

  it("counts each place that nearly equals the fastest once", () => {
    expect(rivalSpeeds(curveOf([1, 9, 9, 1, 1, 8.75, 8.75, 1, 1, 6, 6, 1]), 2, 8.5)).toEqual([9, 8.75]);
  });
});
