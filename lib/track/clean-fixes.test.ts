import { describe, expect, it } from "vitest";

import { fixesOf, makeTrack } from "@/tests/support/made-track";

import { cleanFixes } from "./clean-fixes";
import type { Fixes } from "./fixes";

const steady = () => makeTrack(() => ({ speedMps: 6, courseDeg: 70 }), { seconds: 300, noiseM: 1 }).fixes;

const countOf = (cleaned: ReturnType<typeof cleanFixes>, code: string) =>
  cleaned.notes.find((note) => note.code === code)?.count ?? 0;

/** A copy with some places moved by degrees. */
function moved(fixes: Fixes, from: number, to: number, latDeg: number): Fixes {
  const lat = Float64Array.from(fixes.latDeg);
  for (let i = from; i < to; i++) lat[i] = (lat[i] ?? NaN) + latDeg;
  return { ...fixes, latDeg: lat };
}

describe("cleaning", () => {
  it("leaves a sound track as it is and says nothing", () => {
    const raw = steady();
    const cleaned = cleanFixes(raw);
    expect(cleaned.fixes.count).toBe(raw.count);
    expect(cleaned.notes).toEqual([]);
    expect(cleaned.medianStepS).toBe(1);
  });

  it.each([
    ["one fix 50 m off", 150, 151, 0.00045],
    ["one fix 20 m off", 150, 151, 0.00018],
    ["three fixes 90 m off", 150, 153, 0.0008],
    ["four fixes 170 m off", 150, 154, 0.0015],
    ["a minute 10 km off", 100, 160, 0.09],
  ])("drops just the wrong fixes: %s", (_, from, to, off) => {
    const cleaned = cleanFixes(moved(steady(), from, to, off));
    expect(cleaned.spikesDropped).toBe(to - from);
    expect(Array.from(cleaned.fixes.timeMs)).not.toContain(steady().timeMs[from]);
  });

  it("never takes a hard but real manoeuvre for a spike", () => {
    // A fall from 9 m/s to standing within a second, and a start to 5 m/s within two: the hardest a rider does.
    const fall = makeTrack(
      (t) => ({ speedMps: t < 60 ? 9 : t < 90 ? 0.3 : Math.min(5, (t - 90) * 2.5), courseDeg: 40 }),
      {
        seconds: 200,
        noiseM: 1.7,
        seed: 4,
      },
    );
    expect(cleanFixes(fall.fixes).spikesDropped).toBe(0);
  });

  it("drops a frozen place that ends in a catch-up, and keeps a rest", () => {
    const raw = steady();
    const lat = Float64Array.from(raw.latDeg);
    const lon = Float64Array.from(raw.lonDeg);
    lat.fill(lat[100] ?? NaN, 101, 109);
    lon.fill(lon[100] ?? NaN, 101, 109);
    expect(countOf(cleanFixes({ ...raw, latDeg: lat, lonDeg: lon }), "frozen")).toBe(8);
    const rest = fixesOf(
      Array.from({ length: 50 }, (_, i) => 1.7e12 + i * 1000),
      new Array<number>(50).fill(57),
      new Array<number>(50).fill(9),
    );
    expect(cleanFixes(rest).fixes.count).toBe(50);
  });

  it("drops impossible values, sorts what is out of order, merges equal times, leaves out stray clocks", () => {
    const raw = steady();
    const time = Float64Array.from(raw.timeMs);
    const lat = Float64Array.from(raw.latDeg);
    const lon = Float64Array.from(raw.lonDeg);
    lat[0] = 0;
    lon[0] = 0;
    time[1] = 0;
    lat[2] = 95;
    lon[3] = NaN;
    time[4] = NaN;
    [time[50], time[51]] = [time[51] ?? NaN, time[50] ?? NaN];
    time[61] = (time[60] ?? NaN) + 1;
    time[200] = Date.UTC(2099, 0, 1);
    const cleaned = cleanFixes({ ...raw, timeMs: time, latDeg: lat, lonDeg: lon });
    expect(countOf(cleaned, "impossible")).toBe(5);
    expect(countOf(cleaned, "reordered")).toBe(101);
    expect(countOf(cleaned, "merged")).toBe(1);
    expect(countOf(cleaned, "stray_time")).toBe(1);
    const times = Array.from(cleaned.fixes.timeMs);
    expect(times.every((t, i) => i === 0 || t > (times[i - 1] ?? NaN))).toBe(true);
  });

  it("drops a start that slides to rest in a straight line, and keeps a start under way", () => {
    const slide = makeTrack((t) => ({ speedMps: t < 20 ? 4.5 : 0, courseDeg: 215 }), {
      seconds: 120,
      noiseM: 0.8,
    });
    const cleaned = cleanFixes(slide.fixes);
    expect(countOf(cleaned, "bad_start")).toBeGreaterThanOrEqual(19);
    expect(countOf(cleaned, "bad_start")).toBeLessThanOrEqual(24);
    expect(countOf(cleanFixes(steady()), "bad_start")).toBe(0);
  });

  it("carries the other quantities along with their fix", () => {
    const raw = moved(steady(), 10, 11, 0.001);
    const withHeart = { ...raw, heartRateBpm: Float64Array.from({ length: raw.count }, (_, i) => 100 + i) };
    const { fixes } = cleanFixes(withHeart);
    expect(fixes.heartRateBpm?.[9]).toBe(109);
    expect(fixes.heartRateBpm?.[10]).toBe(111);
  });

  it("keeps one of two recordings of the same time and both of two times", () => {
    const one = steady();
    const other = makeTrack(() => ({ speedMps: 3, courseDeg: 200 }), { seconds: 200 }).fixes;
    const joined = (shiftMs: number): Fixes => ({
      ...fixesOf(
        [...one.timeMs, ...other.timeMs.map((t) => t + shiftMs)],
        [...one.latDeg, ...other.latDeg],
        [...one.lonDeg, ...other.lonDeg],
      ),
      segmentStarts: Uint32Array.of(0, one.count),
    });
    const together = cleanFixes(joined(0));
    expect(countOf(together, "second_recording")).toBe(other.count);
    expect(together.fixes.count).toBe(one.count);
    expect(countOf(cleanFixes(joined(600_000)), "second_recording")).toBe(0);
  });

  it("keeps the segments of what is left", () => {
    const raw = { ...steady(), segmentStarts: Uint32Array.of(0, 10, 200) };
    expect(Array.from(cleanFixes(moved(raw, 10, 11, 0.001)).fixes.segmentStarts)).toEqual([0, 10, 199]);
  });
});
