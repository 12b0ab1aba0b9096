import { describe, expect, it } from "vitest";
import { FLAG_GAP, FLAG_ON_FOIL, type SpeedSeries } from "@/lib/track/speed-series";
import { minuteRows } from "./minute-rows";

/** 150 s at 1 Hz: speed is 5 m/s in the first minute, 8 m/s on foil after it; the first ten seconds are a gap. */
function series(): SpeedSeries {
  const count = 151;
  const speed = (i: number) => (i < 60 ? 5 : 8);
  const way = (i: number) => Math.min(i, 60) * 5 + Math.max(0, i - 60) * 8;
  return {
    startMs: 1_000_000,
    stepMs: 1000,
    count,
    latDeg: new Float64Array(count),
    lonDeg: new Float64Array(count),
    speedMps: Float32Array.from({ length: count }, (_, i) => speed(i)),
    speedSeMps: new Float32Array(count),
    courseDeg: new Float32Array(count),
    distanceM: Float64Array.from({ length: count }, (_, i) => way(i)),
    heartRateBpm: null,
    flags: Uint8Array.from({ length: count }, (_, i) => (i < 10 ? FLAG_GAP : i < 60 ? 0 : FLAG_ON_FOIL)),
  };
}

describe("minuteRows", () => {
  it("cuts a stretch into minutes and leaves the rest as a shorter row", () => {
    const rows = minuteRows(series(), { startMs: 1_000_000, endMs: 1_150_000 });
    expect(rows.map((row) => (row.endMs - row.startMs) / 1000)).toEqual([60, 60, 30]);
    expect(rows.map((row) => row.distanceM)).toEqual([300, 480, 240]);
  });

  it("takes means and maxima of the known samples alone", () => {
    const [first, second] = minuteRows(series(), { startMs: 1_000_000, endMs: 1_120_000 });
    expect([first?.speedMpsMean, first?.speedMpsMax, first?.onFoilShare]).toEqual([5, 5, 0]);
    expect([second?.speedMpsMean, second?.onFoilShare]).toEqual([8, 1]);
  });

  it("says nothing of a minute that is a gap", () => {
    const [row] = minuteRows(series(), { startMs: 1_000_000, endMs: 1_010_000 });
    expect([row?.speedMpsMean, row?.speedMpsMax, row?.onFoilShare]).toEqual([null, null, null]);
  });

  it("counts every metre of a stretch once", () => {
    const rows = minuteRows(series(), { startMs: 1_005_000, endMs: 1_145_000 });
    expect(rows.reduce((sum, row) => sum + row.distanceM, 0)).toBe(85 * 8 + 55 * 5);
  });
});
