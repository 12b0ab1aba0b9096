import { describe, expect, it } from "vitest";
import { smoothedTrackFromSpeed } from "@/tests/support/smoothed-track-from-speed";
import { cumulatedWayM, foilMask } from "./way";

const lastOf = (column: Float64Array): number => column.at(-1) ?? NaN;

describe("cumulatedWayM", () => {
  it("is speed times time at a constant speed, on foil and off", () => {
    const track = smoothedTrackFromSpeed(() => 6, 100);
    expect(lastOf(cumulatedWayM(track, foilMask(track, [])))).toBeCloseTo(600, 6);
    const whole = foilMask(track, [{ start: 0, end: track.count - 1, confidence: 1 }]);
    expect(lastOf(cumulatedWayM(track, whole))).toBeCloseTo(600, 6);
  });

  it("does not count the waves' to-and-fro of a floating rider", () => {
    // 0.5 m/s of way and a swing of 1 m/s with a period of 4 s, along one line.
    const swing = (t: number): number => 0.5 + Math.sin((2 * Math.PI * t) / 4);
    const track = smoothedTrackFromSpeed((t) => Math.abs(swing(t)), 400, {
      courseDeg: (t) => (swing(t) >= 0 ? 0 : 180),
    });
    const pathM = track.speedMps.reduce((sum, speed) => sum + speed / 4, 0);
    expect(pathM).toBeGreaterThan(270);
    // 2 %: the window is two periods, only the ends of the track differ.
    expect(lastOf(cumulatedWayM(track, foilMask(track, []))) / 200).toBeCloseTo(1, 1);
  });

  it("stands still ashore and over a hole of half a minute, and is carried over one of five seconds", () => {
    // One step of a quarter of a second at 6 m/s.
    const stepM = 1.51;
    const ashore = smoothedTrackFromSpeed(() => 6, 100, { isOnWater: (t) => t < 50 });
    expect(Math.abs(lastOf(cumulatedWayM(ashore, foilMask(ashore, []))) - 300)).toBeLessThan(stepM);
    const gap = (lengthS: number) => (t: number) => (t >= 40 && t < 40 + lengthS ? lengthS : 0);
    const long = smoothedTrackFromSpeed(() => 6, 100, { gapS: gap(30) });
    expect(Math.abs(lastOf(cumulatedWayM(long, foilMask(long, []))) - 420)).toBeLessThan(stepM);
    const short = smoothedTrackFromSpeed(() => 6, 100, { gapS: gap(5) });
    expect(Math.abs(lastOf(cumulatedWayM(short, foilMask(short, []))) - 600)).toBeLessThan(stepM);
  });
});
