import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { FLAG_GAP, FLAG_ON_WATER, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";
import { madeQuality } from "@/tests/support/made-quality";
import { smoothedTrackFromSpeed } from "@/tests/support/smoothed-track-from-speed";
import { analysePrepared } from "./analyse-prepared";
import type { AnalysedTrack, Analysis, Best, Withheld } from "./analysis";
import { bestFigures } from "./bests";
import { summarise } from "./summarise";

/** A series of one sample a second at the given speeds; the way is their trapezoid sum. */
function seriesOf(speeds: readonly number[], seMps = 0, flags?: readonly number[]): SpeedSeries {
  const distanceM = new Float64Array(speeds.length);
  for (let i = 1; i < speeds.length; i++) {
    distanceM[i] = (distanceM[i - 1] ?? 0) + ((speeds[i - 1] ?? 0) + (speeds[i] ?? 0)) / 2;
  }
  return {
    startMs: 0,
    stepMs: 1000,
    count: speeds.length,
    latDeg: new Float64Array(speeds.length),
    lonDeg: new Float64Array(speeds.length),
    speedMps: Float32Array.from(speeds),
    speedSeMps: new Float32Array(speeds.length).fill(seMps),
    courseDeg: new Float32Array(speeds.length),
    distanceM,
    heartRateBpm: null,
    flags: Uint8Array.from(speeds, (_, i) => flags?.[i] ?? FLAG_ON_WATER),
  };
}

const whole = (series: SpeedSeries): Stretch => ({ startMs: 0, endMs: (series.count - 1) * 1000 });
const speedOf = (best: Best | Withheld): number | string =>
  "withheld" in best ? best.withheld : best.speedMps;

describe("bestFigures", () => {
  const steady = seriesOf(Array.from({ length: 701 }, (_, i) => (i >= 100 && i < 200 ? 10 : 5)));

  it("is exact for a speed that is constant in pieces", () => {
    const { bests } = bestFigures(steady, whole(steady), { grade: "A" });
    expect(speedOf(bests.s2)).toBeCloseTo(10, 9);
    expect(speedOf(bests.s10)).toBeCloseTo(10, 9);
    expect(speedOf(bests.m500)).toBeCloseTo(10, 9);
    // 990 m at 10 m/s in 99 s, ramps of a second at either end (15 m in 2 s), the rest at 5 m/s.
    expect(speedOf(bests.s600)).toBeCloseTo((990 + 15 + 5 * (600 - 101)) / 600, 9);
    expect(speedOf(bests.s3600)).toBe("too_short");
  });

  it("withholds windows under 5 s when the recording is graded below B", () => {
    expect(speedOf(bestFigures(steady, whole(steady), { grade: "B" }).bests.s2)).toBeCloseTo(10, 9);
    expect(speedOf(bestFigures(steady, whole(steady), { grade: "C" }).bests.s2)).toBe("quality");
    expect(speedOf(bestFigures(steady, whole(steady), { grade: "C" }).bests.s10)).toBeCloseTo(10, 9);
  });

  it("never takes a window across a gap or off the water", () => {
    const flags = Array.from({ length: 701 }, (_, i) => {
      if (i >= 150 && i < 166) return FLAG_GAP | FLAG_ON_WATER;
      return i > 180 && i < 190 ? 0 : FLAG_ON_WATER;
    });
    const broken = seriesOf(Array.from(steady.speedMps), 0, flags);
    const { bests } = bestFigures(broken, whole(broken), { grade: "A" });
    // The longest unbroken fast piece is from 100 to 149 s: 490 m.
    expect(speedOf(bests.m250)).toBeCloseTo(10, 9);
    expect(speedOf(bests.m500)).toBeLessThan(10);
  });

  it("passes over a gap of up to 15 s for 500 m and more, and never for less", () => {
    const flags = Array.from({ length: 701 }, (_, i) =>
      i >= 124 && i < 139 ? FLAG_GAP | FLAG_ON_WATER : FLAG_ON_WATER,
    );
    const broken = seriesOf(Array.from(steady.speedMps), 0, flags);
    const { bests } = bestFigures(broken, whole(broken), { grade: "A" });
    expect(speedOf(bests.m500)).toBeCloseTo(10, 9);
    // The fast piece after the hole is 610 m and holds 250 m by itself.
    const within = bests.m250;
    expect("startMs" in within && within.startMs >= broken.startMs + 139_000).toBe(true);
  });

  it("finds a 2 s best between the samples of a 1 Hz series", () => {
    // A smooth top at 50.5 s: the mean over 2 s of 9 - 0.2 (t - 50.5)^2 is 9 - 0.2 / 3 (closed form).
    const top = seriesOf(Array.from({ length: 101 }, (_, i) => Math.max(2, 9 - 0.2 * (i - 50.5) ** 2)));
    const { bests } = bestFigures(top, whole(top), { grade: "A" });
    // 0.01: straight pieces of a quarter of a second and 32-bit speeds.
    expect(speedOf(bests.s2)).toBeCloseTo(9 - 0.2 / 3, 2);
  });

  it("takes the expected excess off the maximum of many equal windows with noise, and none off a single one", () => {
    const level = seriesOf(new Array<number>(200).fill(8), 0.3);
    const { bests } = bestFigures(level, whole(level), { grade: "A" });
    expect(speedOf(bests.s2)).toBeLessThan(8 - 0.1);
    const peak = seriesOf(
      Array.from({ length: 200 }, (_, i) => (i >= 100 && i < 103 ? 10 : 5)),
      0.1,
    );
    expect(speedOf(bestFigures(peak, whole(peak), { grade: "A" }).bests.s2)).toBeGreaterThan(9.9);
  });

  it("states a standard error that falls with the length of the window", () => {
    const noisy = seriesOf(new Array<number>(2000).fill(7), 0.3);
    const { bests } = bestFigures(noisy, whole(noisy), { grade: "A" });
    const errors = [bests.s2, bests.s10, bests.s60, bests.s600].map((best) =>
      "seMps" in best ? best.seMps : NaN,
    );
    expect([...errors].sort((a, b) => b - a)).toEqual(errors);
    // 0.26 from the noise, 0.12 from the blunting of tops, 0.25 because this way is off the foil.
    expect(errors[0]).toBeCloseTo(Math.hypot(0.26, 0.12, 0.25), 1);
  });

  it("gives the mean of five separate tens only when there are five", () => {
    const long = seriesOf(new Array<number>(120).fill(6));
    expect(bestFigures(long, whole(long), { grade: "A" }).bestTensMeanMps).toBeCloseTo(6, 9);
    const short = seriesOf(new Array<number>(35).fill(6));
    expect(bestFigures(short, whole(short), { grade: "A" }).bestTens).toHaveLength(3);
    expect(bestFigures(short, whole(short), { grade: "A" }).bestTensMeanMps).toBeNull();
  });
});

/** A session with two flights, bumps of 9 s, and a minute afloat at either end. */
function madeAnalysis(): Analysis {
  const flying = (t: number): boolean => (t > 60 && t < 300) || (t > 360 && t < 600);
  const speed = (t: number): number => (flying(t) ? 7 + 1.5 * Math.sin((2 * Math.PI * t) / 9) : 0.8);
  const smoothed = smoothedTrackFromSpeed(speed, 660, { startMs: 1_750_000_000_000, seMps: 0.1 });
  const window = { startMs: smoothed.startMs, endMs: smoothed.startMs + 660_000 };
  const empty = new Float64Array(0);
  return analysePrepared(
    {
      cleaned: {
        count: 0,
        timeMs: empty,
        latDeg: empty,
        lonDeg: empty,
        elevationM: null,
        heartRateBpm: null,
        receiverSpeedMps: null,
        hdop: null,
        satellites: null,
        segmentStarts: new Uint32Array(0),
      },
      smoothed,
      window,
      waterSessions: [window],
      quality: madeQuality(),
      rawLengthM: 0,
      rawFixes: 0,
      rawSegments: 0,
      firstFixMs: window.startMs,
      lastFixMs: window.endMs,
    },
    { discipline: "downwind", trim: null, minimumFlyingSpeedMps: null },
  );
}

describe("summarise", () => {
  const analysis = madeAnalysis();

  it("gives over the whole window the figures that are stored", () => {
    const again = summarise(analysis satisfies AnalysedTrack, analysis.window);
    expect(again).toEqual(analysis.figures);
  });

  it("knows two flights of four minutes, their distance and their share", () => {
    const { figures } = analysis;
    expect(figures.takeoffs).toBe(2);
    expect(figures.touchdowns).toBe(2);
    // 3 s: where on the made step the edges are placed.
    expect(Math.abs(figures.onFoilTimeS - 480)).toBeLessThan(3);
    expect(figures.onFoilDistanceM / (480 * 7)).toBeCloseTo(1, 1);
    expect(figures.onFoilShareOfTime).toBeCloseTo(480 / 660, 2);
    const sum = analysis.segments.reduce((way, segment) => way + segment.distanceM, 0);
    expect(figures.onFoilDistanceM).toBeCloseTo(sum, 9);
  });

  it("counts bumps a kilometre, an hour and their interval: one every 9 s", () => {
    const { bumps } = analysis.figures;
    expect(bumps?.intervalSMedian).toBeCloseTo(9, 1);
    // 53 whole waves in 480 s; the first and the last of each flight may be cut.
    expect(Math.abs((bumps?.ridesPerHour ?? 0) - 400)).toBeLessThan(20);
    // Mean speed over the upper half of a sine: 7 + 1.5 * 2 / pi.
    expect(bumps?.ridingSpeedMps).toBeCloseTo(7 + 3 / Math.PI, 1);
    expect(bumps?.gainMpsMean).toBeCloseTo(3, 1);
  });

  it("adds up: the ways and times on foil of two halves make the whole", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 659_999 }), (cut) => {
        const { startMs, endMs } = analysis.window;
        const first = summarise(analysis, { startMs, endMs: startMs + cut });
        const second = summarise(analysis, { startMs: startMs + cut, endMs });
        const total = analysis.figures;
        expect(first.waterDistanceM + second.waterDistanceM).toBeCloseTo(total.waterDistanceM, 6);
        expect(first.onFoilTimeS + second.onFoilTimeS).toBeCloseTo(total.onFoilTimeS, 6);
        expect(first.takeoffs + second.takeoffs).toBeGreaterThanOrEqual(total.takeoffs);
        // 2 m: a cut segment is measured on the series' own samples; the made flights begin within one of them.
        expect(Math.abs(first.onFoilDistanceM + second.onFoilDistanceM - total.onFoilDistanceM)).toBeLessThan(
          2,
        );
      }),
      { seed: 21, numRuns: 60 },
    );
  });

  it("is no faster in a part than in the whole beyond the standard error (60 s and 500 m), and stays within the stretch", () => {
    const stretch = fc.tuple(fc.integer({ min: 0, max: 600_000 }), fc.integer({ min: 5_000, max: 660_000 }));
    fc.assert(
      fc.property(stretch, ([from, length]) => {
        const startMs = analysis.window.startMs + from;
        const endMs = Math.min(analysis.window.endMs, startMs + length);
        const part = summarise(analysis, { startMs, endMs });
        for (const key of ["s60", "m500"] as const) {
          const best = part.bests[key];
          if ("withheld" in best) continue;
          // The excess taken off a maximum is less with fewer rivals: a part may show more by some of its standard error.
          expect(best.speedMps).toBeLessThanOrEqual(
            Number(speedOf(analysis.figures.bests[key])) + best.seMps,
          );
          expect(best.startMs).toBeGreaterThanOrEqual(startMs);
          expect(best.endMs).toBeLessThanOrEqual(endMs);
        }
      }),
      { seed: 22, numRuns: 60 },
    );
  });

  it("gives zeros, nulls and reasons for an empty series, and never NaN", () => {
    const nothing: AnalysedTrack = {
      series: seriesOf([]),
      segments: [],
      bumpRides: [],
      lulls: [],
      quality: madeQuality("D"),
    };
    const figures = summarise(nothing, { startMs: 0, endMs: 0 });
    expect(JSON.stringify(figures)).not.toContain("NaN");
    expect(figures.waterDistanceM).toBe(0);
    expect(figures.bumps).toBeNull();
    expect(figures.bests.nm).toEqual({ withheld: "too_short" });
    const numbers = Object.values(figures).filter((value) => typeof value === "number");
    expect(numbers.every(Number.isFinite)).toBe(true);
  });

  it("costs in proportion to the samples: eight times as many take at most sixteen times as long", () => {
    const trackOf = (count: number): AnalysedTrack => ({
      ...analysis,
      series: seriesOf(
        Array.from({ length: count }, (_, i) => 6 + 2 * Math.sin(i / 1.4) * Math.sin(i / 700)),
        0.2,
      ),
    });
    const quickestMs = (track: AnalysedTrack): number => {
      let least = Infinity;
      for (let k = 0; k < 15; k++) {
        const from = performance.now();
        summarise(track, whole(track.series));
        least = Math.min(least, performance.now() - from);
      }
      return least;
    };
    // Milliseconds belong to the bench (17 ms of processor time for 144,000); twice linear leaves room for a busy machine.
    const small = quickestMs(trackOf(18_000));
    expect(quickestMs(trackOf(144_000))).toBeLessThan(16 * small);
  });
});
