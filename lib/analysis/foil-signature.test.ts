import { describe, expect, it } from "vitest";
import { smoothedTrackFromSpeed } from "@/tests/support/smoothed-track-from-speed";
import { HEIGHT_SPREAD_M_MAX, keepFoiling, type Heights } from "./foil-signature";
import { findOnFoil } from "./on-foil";

/** Starts and stops like a foil session: 1.4 m/s, and 7 m/s with bumps from 60 to 180 s and from 240 to 360 s. */
const riding = (t: number): number =>
  (t > 60 && t < 180) || (t > 240 && t < 360) ? 7 + Math.sin((2 * Math.PI * t) / 9) : 1.4;
const options = { discipline: "downwind", trim: null, minimumFlyingSpeedMps: null } as const;

function heights(track: { startMs: number }, heightM: (t: number) => number): Heights {
  const times = Array.from({ length: 420 }, (_, t) => t);
  return {
    timeMs: Float64Array.from(times, (t) => track.startMs + t * 1000),
    elevationM: Float64Array.from(times, heightM),
  };
}

describe("keepFoiling", () => {
  it("finds nothing where the heights fall as on a bicycle downhill, and all where they wander as a receiver's do", () => {
    const track = smoothedTrackFromSpeed(riding, 420);
    expect(
      findOnFoil(
        track,
        options,
        heights(track, (t) => 900 - t),
      ).spans,
    ).toEqual([]);
    const wandering = heights(track, (t) => 12 * Math.sin(t / 40));
    expect(findOnFoil(track, options, wandering).spans).toHaveLength(2);
  });

  it("looks only at heights on foil: the drive up the hill afterwards changes nothing", () => {
    const track = smoothedTrackFromSpeed(riding, 420);
    const hill = heights(track, (t) => (t > 370 ? HEIGHT_SPREAD_M_MAX * 3 : 2));
    expect(findOnFoil(track, options, hill).spans).toHaveLength(2);
  });

  it("keeps nothing when most of the time on foil lies in holes of the recording", () => {
    const gapS = (t: number): number => (t % 18 < 12 ? 12 : 0);
    expect(findOnFoil(smoothedTrackFromSpeed(riding, 420, { gapS }), options).spans).toEqual([]);
  });

  it("leaves out one segment that was not recorded for more than half, and keeps the other", () => {
    const gapS = (t: number): number => (t > 66 && t < 174 && t % 14 < 10 ? 10 : 0);
    const { spans } = findOnFoil(smoothedTrackFromSpeed(riding, 420, { gapS }), options);
    expect(spans).toHaveLength(1);
    expect(spans[0]?.start).toBeGreaterThan(200 * 4);
  });

  it("leaves out what is faster than any foil", () => {
    const train = (t: number): number => (t > 240 && t < 360 ? 30 : riding(t));
    const track = smoothedTrackFromSpeed(train, 420);
    expect(findOnFoil(track, options).spans.every((span) => span.end < 240 * 4)).toBe(true);
  });

  it("accepts a recording that begins and ends on foil when the speed is as lively as bumps make it", () => {
    const lively = smoothedTrackFromSpeed((t) => 7 + Math.sin((2 * Math.PI * t) / 9), 120);
    const span = [{ start: 0, end: lively.count - 1, confidence: 1 }];
    expect(keepFoiling(lively, span, 3.6)).toHaveLength(1);
    const steady = smoothedTrackFromSpeed(() => 5, 120);
    expect(keepFoiling(steady, span, 3.6)).toEqual([]);
  });
});
