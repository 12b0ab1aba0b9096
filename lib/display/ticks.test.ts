import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { SPEED_BANDS, speedBand, speedBandEdges, speedScale } from "./speed-ramp";
import { niceTicks, timeTicks } from "./ticks";

describe("ticks", () => {
  it("are round numbers inside the interval", () => {
    expect(niceTicks(0, 22, 5)).toEqual([0, 5, 10, 15, 20]);
    expect(niceTicks(0, 26.8, 11)).toEqual([0, 2, 4, 6, 8, 10, 12, 14, 16, 18, 20, 22, 24, 26]);
    expect(niceTicks(-0.6, 0.9, 5)).toEqual([-0.6, -0.4, -0.2, 0, 0.2, 0.4, 0.6, 0.8]);
  });

  it("are none for an interval without length or with a missing end", () => {
    expect(niceTicks(5, 5, 4)).toEqual([]);
    expect(niceTicks(NaN, 5, 4)).toEqual([]);
    expect(niceTicks(5, 1, 4)).toEqual([]);
  });

  it("stay inside, in order, evenly apart and near the wanted count for any interval", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e4, max: 1e4, noNaN: true }),
        fc.double({ min: 1e-3, max: 1e4, noNaN: true }),
        fc.integer({ min: 2, max: 12 }),
        (low, length, wanted) => {
          const ticks = niceTicks(low, low + length, wanted);
          const slack = length * 1e-6;
          expect(ticks.length).toBeLessThanOrEqual(2 * wanted + 1);
          expect(ticks.length).toBeGreaterThanOrEqual(Math.floor(wanted / 2));
          for (const [i, tick] of ticks.entries()) {
            expect(tick).toBeGreaterThanOrEqual(low - slack);
            expect(tick).toBeLessThanOrEqual(low + length + slack);
            if (i > 0) expect(tick).toBeGreaterThan(ticks[i - 1] ?? NaN);
          }
        },
      ),
      { seed: 2026 },
    );
  });

  it("of time stand at round clock times of the zone", () => {
    const start = Date.UTC(2025, 5, 14, 11, 8);
    // 13:08 to 14:18 in Denmark (UTC+2): quarters of an hour.
    expect(timeTicks(start, start + 70 * 60000, { wanted: 5, offsetMin: 120 })).toEqual(
      [15, 30, 45, 60, 75].map((minute) => Date.UTC(2025, 5, 14, 11, minute)),
    );
    // Adelaide stands 9:30 ahead: a full hour there is half past in UTC.
    expect(timeTicks(start, start + 3600000, { wanted: 1, offsetMin: 570 })).toEqual([
      Date.UTC(2025, 5, 14, 11, 30),
    ]);
  });
});

describe("speed bands", () => {
  it("end on whole units and hold every speed between", () => {
    const scale = speedScale(4.7, 9.6, "kn");
    expect(scale.lowMps).toBeCloseTo((9 * 1852) / 3600, 12);
    expect(scale.highMps).toBeCloseTo((19 * 1852) / 3600, 12);
    expect(speedBand(4.7, scale)).toBe(0);
    expect(speedBand(9.7, scale)).toBe(SPEED_BANDS - 1);
  });

  it("are open at both ends, and a missing speed has none", () => {
    const scale = { lowMps: 2, highMps: 10 };
    expect(speedBand(-1, scale)).toBe(0);
    expect(speedBand(99, scale)).toBe(SPEED_BANDS - 1);
    expect(speedBand(NaN, scale)).toBeNull();
    expect(speedBandEdges(scale)).toEqual([2, 3, 4, 5, 6, 7, 8, 9, 10]);
  });

  it("have a width even when all speeds are equal or missing", () => {
    for (const scale of [speedScale(5, 5, "m/s"), speedScale(NaN, NaN, "kn"), speedScale(9, 2, "kn")]) {
      expect(scale.highMps).toBeGreaterThan(scale.lowMps);
    }
  });
});
