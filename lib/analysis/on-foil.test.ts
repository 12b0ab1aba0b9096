import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { smoothedTrackFromSpeed } from "@/tests/support/smoothed-track-from-speed";
import type { AnalysisOptions } from "./analysis";
import { findOnFoil } from "./on-foil";

const options: AnalysisOptions = { discipline: "downwind", trim: null, minimumFlyingSpeedMps: null };

/** Paddling at 1.4 m/s; between the given times up within 3 s, bumps about 6 m/s, down within 2 s. */
function flights(times: readonly (readonly [number, number])[], cruiseMps = 6): (timeS: number) => number {
  return (t) => {
    for (const [from, to] of times) {
      if (t < from - 3 || t > to + 2) continue;
      const up = Math.min(1, (t - from + 3) / 3);
      const down = Math.min(1, (to + 2 - t) / 2);
      const bumps = cruiseMps + 1.2 * Math.sin((2 * Math.PI * t) / 9);
      return 1.4 + (bumps - 1.4) * Math.min(up, down);
    }
    return 1.4;
  };
}

const timesOf = (
  track: { startMs: number; stepMs: number },
  spans: readonly { start: number; end: number }[],
) => spans.map((span) => [(span.start * track.stepMs) / 1000, (span.end * track.stepMs) / 1000]);

describe("findOnFoil", () => {
  it("finds every flight of a session with its ends within a second and a half", () => {
    const truth = [
      [60, 180],
      [220, 233],
      [300, 520],
    ] as const;
    const track = smoothedTrackFromSpeed(flights(truth), 600);
    const { spans } = findOnFoil(track, options);
    expect(spans).toHaveLength(3);
    timesOf(track, spans).forEach(([start, end], k) => {
      // The ramps last 3 s and 2 s: the edge lies somewhere on them.
      expect(Math.abs((start ?? 0) - (truth[k]?.[0] ?? 0))).toBeLessThan(1.5);
      expect(Math.abs((end ?? 0) - (truth[k]?.[1] ?? 0))).toBeLessThan(1.5);
    });
  });

  it("finds nothing in a hull that goes steadily at 3.6 m/s, as yachts and motor boats do", () => {
    const sailing = (t: number): number => 3.6 * Math.min(1, t / 120) + 0.15 * Math.sin(t / 15);
    expect(findOnFoil(smoothedTrackFromSpeed(sailing, 7200), options).spans).toEqual([]);
  });

  it("finds nothing in paddling at 2.4 m/s with the waves' to-and-fro", () => {
    const paddling = (t: number): number => 2.4 + 0.8 * Math.sin((2 * Math.PI * t) / 5);
    expect(findOnFoil(smoothedTrackFromSpeed(paddling, 1800), options).spans).toEqual([]);
  });

  it("keeps the flights and leaves out the steady tow home by boat", () => {
    const riding = flights([
      [60, 180],
      [220, 330],
    ]);
    const session = (t: number): number => {
      if (t < 500) return riding(t);
      return 1.4 + 2.9 * Math.min(1, (t - 500) / 60);
    };
    const track = smoothedTrackFromSpeed(session, 1500);
    const { spans } = findOnFoil(track, options);
    expect(spans).toHaveLength(2);
    expect(Math.max(...spans.map((span) => span.end))).toBeLessThan(500 * 4);
  });

  it("does not end a segment for a touch of a second and does for five", () => {
    const base = flights([[60, 200]]);
    const touching = (t: number): number => {
      if (t > 100 && t < 101) return 3;
      if (t > 150 && t < 155) return 1.5;
      return base(t);
    };
    expect(findOnFoil(smoothedTrackFromSpeed(touching, 260), options).spans).toHaveLength(2);
  });

  it("calls nothing on foil outside the time on the water", () => {
    const speed = flights([
      [60, 180],
      [300, 420],
    ]);
    const track = smoothedTrackFromSpeed(speed, 500, { isOnWater: (t) => t < 250 });
    const { spans } = findOnFoil(track, options);
    expect(spans).toHaveLength(1);
    expect(spans[0]?.end).toBeLessThan(250 * 4);
  });

  it("cuts a segment at the rider's own ends, to the sample", () => {
    const track = smoothedTrackFromSpeed(flights([[60, 400]]), 460, {
      isOnWater: (t) => t >= 100 && t <= 300,
    });
    const { spans } = findOnFoil(track, options);
    expect(spans).toHaveLength(1);
    expect(spans[0]?.start).toBeGreaterThanOrEqual(100 * 4);
    expect(spans[0]?.end).toBeLessThanOrEqual(300 * 4);
    expect((spans[0]?.end ?? 0) - (spans[0]?.start ?? 0)).toBeGreaterThan(198 * 4);
  });

  it("flies on through a hole of eight seconds at flying speed, and not through one of twenty", () => {
    const made = (holeS: number) =>
      smoothedTrackFromSpeed(flights([[60, 300]]), 360, {
        gapS: (t) => (t > 150 && t < 150 + holeS ? holeS : 0),
      });
    expect(findOnFoil(made(8), options).spans).toHaveLength(1);
    expect(findOnFoil(made(20), options).spans).toHaveLength(2);
  });

  it("flies slower when the setup's minimum flying speed is known to be low", () => {
    const slow = flights([[60, 200]], 4.3);
    const known = findOnFoil(smoothedTrackFromSpeed(slow, 260), { ...options, minimumFlyingSpeedMps: 2.6 });
    expect(known.stallMps).toBeLessThanOrEqual(2.6 * 1.12 + 1e-9);
    expect(known.spans).toHaveLength(1);
  });

  it("gives spans in order, apart, at least 3 s long and inside the track, whatever the speed does", () => {
    const speeds = fc.array(fc.double({ min: 0, max: 12, noNaN: true }), { minLength: 2, maxLength: 60 });
    fc.assert(
      fc.property(speeds, (values) => {
        const at = (t: number): number => values[Math.min(values.length - 1, Math.floor(t / 5))] ?? 0;
        const track = smoothedTrackFromSpeed(at, values.length * 5);
        let before = -Infinity;
        for (const span of findOnFoil(track, options).spans) {
          expect(span.start).toBeGreaterThan(before);
          expect(span.end - span.start).toBeGreaterThanOrEqual(12);
          expect(span.end).toBeLessThanOrEqual(track.count - 1);
          expect(span.confidence).toBeGreaterThanOrEqual(0);
          expect(span.confidence).toBeLessThanOrEqual(1);
          before = span.end;
        }
      }),
      { seed: 3, numRuns: 200 },
    );
  });

  it("answers the same for a recording sampled more finely", () => {
    const speed = flights([
      [60, 180],
      [220, 330],
    ]);
    const coarse = smoothedTrackFromSpeed(speed, 400);
    const fine = smoothedTrackFromSpeed(speed, 400, { stepMs: 100 });
    const a = timesOf(coarse, findOnFoil(coarse, options).spans).flat();
    const b = timesOf(fine, findOnFoil(fine, options).spans).flat();
    expect(b).toHaveLength(a.length);
    // A quarter of a second is the coarse step.
    a.forEach((time, k) => expect(Math.abs(time - (b[k] ?? 0))).toBeLessThan(0.25));
  });
});
