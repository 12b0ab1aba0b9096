import { describe, expect, it } from "vitest";
import { FLAG_DROPOUT, FLAG_GAP, FLAG_ON_FOIL, FLAG_ON_WATER } from "@/lib/track/speed-series";
import { smoothedTrackFromSpeed, type MadeTrack } from "@/tests/support/smoothed-track-from-speed";
import { speedSeriesOf } from "./speed-series-of";
import { cumulatedWayM, foilMask } from "./way";

function seriesOf(made: MadeTrack, rateHz = 1, speed: (t: number) => number = () => 6) {
  const track = smoothedTrackFromSpeed(speed, 100, made);
  const onFoil = foilMask(track, [{ start: 0, end: track.count - 1, confidence: 1 }]);
  const wayM = cumulatedWayM(track, onFoil);
  return {
    track,
    wayM,
    series: speedSeriesOf({ track, wayM, onFoil, rateHz, gapLimitS: 5, dropoutLimitS: 3.5 }),
  };
}

describe("speedSeriesOf", () => {
  it("stands on whole seconds at 1 Hz, and keeps the recording's own rate when that is faster", () => {
    const late = seriesOf({ startMs: 1_750_000_000_250 }).series;
    expect([late.startMs, late.stepMs]).toEqual([1_750_000_001_000, 1000]);
    const quick = seriesOf({ stepMs: 100 }, 10).series;
    expect([quick.stepMs, quick.count]).toEqual([100, 1001]);
  });

  it("holds the exact way at every sample, never falling", () => {
    const { series, wayM } = seriesOf({}, 1, (t) => 6 + Math.sin(t));
    for (let i = 0; i < series.count; i++) expect(series.distanceM[i]).toBe(wayM[4 * i]);
    expect(series.distanceM.every((way, i) => way >= (series.distanceM[i - 1] ?? 0))).toBe(true);
  });

  it("tells a gap from a dropout, and both from the recording's own step", () => {
    const { series } = seriesOf({
      gapS: (t) => (t > 20 && t < 30 ? 10 : t > 50 && t < 54 ? 4 : t > 70 && t < 73 ? 3 : 0),
    });
    const usual = FLAG_ON_WATER | FLAG_ON_FOIL;
    expect(series.flags[25]).toBe(usual | FLAG_GAP);
    expect(series.flags[52]).toBe(usual | FLAG_DROPOUT);
    expect(series.flags[71]).toBe(usual);
  });

  it("has a course true to the compass, and none at rest", () => {
    const { series } = seriesOf({ courseDeg: () => 250 }, 1, (t) => (t < 50 ? 6 : 0.1));
    // 32-bit degrees.
    expect(series.courseDeg[10]).toBeCloseTo(250, 3);
    expect(series.courseDeg[80]).toBeNaN();
  });

  it("is empty for an empty track", () => {
    const track = { ...smoothedTrackFromSpeed(() => 0, 0), count: 0 };
    const empty = new Float64Array(0);
    const series = speedSeriesOf({
      track,
      wayM: empty,
      onFoil: empty,
      rateHz: 1,
      gapLimitS: 5,
      dropoutLimitS: 3.5,
    });
    expect(series.count).toBe(0);
  });
});
