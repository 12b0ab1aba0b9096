import { lineString, simplify } from "@turf/turf";
import { describe, expect, it } from "vitest";
import { SPEED_BANDS } from "@/lib/display/speed-ramp";
import { FLAG_GAP, FLAG_ON_FOIL, FLAG_ON_WATER, type SpeedSeries } from "@/lib/track/speed-series";
import { fitBox } from "./fit-box";
import { graticule } from "./graticule";
import { nearestSample } from "./nearest-sample";
import { scaleBarLength } from "./scale-bar-length";
import { staticPaths } from "./static-paths";
import { trackEnds } from "./track-ends";
import { trackFeatures } from "./track-features";
import { OFF_FOIL, trackRuns } from "./track-runs";
import { positionAt, sampleRange, trackShape } from "./track-shape";
import { trackSpeedScale } from "./track-speed-scale";

const FOIL = FLAG_ON_WATER | FLAG_ON_FOIL;
/** Mean length of a degree of the meridian, metres: 2 pi R1 / 360 with R1 = 6371008.8 m (IUGG 1980). */
const DEGREE_M = 111_195.08;

type Sample = { lat: number; lon: number; speed?: number; flags?: number };

function seriesOf(samples: readonly Sample[], stepMs = 1000): SpeedSeries {
  const speedMps = Float32Array.from(samples, ({ speed }) => speed ?? 8);
  return {
    startMs: 1_000_000,
    stepMs,
    count: samples.length,
    latDeg: Float64Array.from(samples, ({ lat }) => lat),
    lonDeg: Float64Array.from(samples, ({ lon }) => lon),
    speedMps,
    speedSeMps: speedMps.map(() => 0.1),
    courseDeg: speedMps.map(() => 90),
    distanceM: new Float64Array(samples.length),
    heartRateBpm: null,
    flags: Uint8Array.from(samples, ({ flags }) => flags ?? FOIL),
  };
}

/** A run east along the equator: sample i is 10 m on. */
const east = (count: number, change: (i: number) => Partial<Sample> = () => ({})) =>
  seriesOf(Array.from({ length: count }, (_, i) => ({ lat: 0, lon: (10 * i) / DEGREE_M, ...change(i) })));

describe("trackShape", () => {
  it("goes over the antimeridian without a jump", () => {
    const shape = trackShape(seriesOf([179.998, 179.999, -180, -179.999].map((lon) => ({ lat: -17, lon }))));
    expect([...shape.lonDeg].map((lon) => lon.toFixed(3))).toEqual([
      "179.998",
      "179.999",
      "180.000",
      "180.001",
    ]);
    expect(shape.bounds?.[2]).toBeGreaterThan(180);
  });

  it("keeps time ashore, gaps and unknown positions out of the drawing and its bounds", () => {
    const shape = trackShape(
      seriesOf([
        { lat: 50, lon: 0, flags: 0 },
        { lat: 51, lon: 0 },
        { lat: 51, lon: 1, flags: FOIL | FLAG_GAP },
        { lat: Number.NaN, lon: 2 },
        { lat: 52, lon: 0.5 },
      ]),
    );
    expect([...shape.drawn]).toEqual([0, 1, 0, 0, 1]);
    expect(shape.bounds).toEqual([0, 51, 0.5, 52]);
  });

  it("has no bounds when nothing was on the water", () => {
    expect(trackShape(seriesOf([{ lat: 1, lon: 1, flags: 0 }])).bounds).toBeNull();
    expect(trackShape(seriesOf([])).bounds).toBeNull();
  });

  it("finds positions between samples and none outside the series", () => {
    const shape = trackShape(east(3));
    expect(positionAt(shape, 1_000_500)?.lonDeg).toBeCloseTo(5 / DEGREE_M, 12);
    expect(positionAt(shape, 1_002_000)?.lonDeg).toBeCloseTo(20 / DEGREE_M, 12);
    expect(positionAt(shape, 999_999)).toBeNull();
    expect(positionAt(shape, 1_002_001)).toBeNull();
  });

  it("counts the samples of a stretch, both ends in", () => {
    const series = east(10);
    expect(sampleRange(series, null)).toEqual({ first: 0, end: 10 });
    expect(sampleRange(series, { startMs: 1_002_000, endMs: 1_004_000 })).toEqual({ first: 2, end: 5 });
    expect(sampleRange(series, { startMs: 1_002_001, endMs: 1_002_999 })).toEqual({ first: 3, end: 3 });
    expect(sampleRange(series, { startMs: 0, endMs: 9e9 })).toEqual({ first: 0, end: 10 });
  });
});

describe("trackRuns", () => {
  const scale = { lowMps: 0, highMps: SPEED_BANDS };

  it("parts the track by speed band and on foil, neighbours sharing the sample where they meet", () => {
    const runs = trackRuns(
      trackShape(east(9, (i) => (i < 3 ? { flags: FLAG_ON_WATER } : { speed: i < 6 ? 2.5 : 5.5 }))),
      { scale },
    );
    expect(runs).toEqual([
      { kind: OFF_FOIL, samples: [0, 3] },
      { kind: 2, samples: [3, 6] },
      { kind: 5, samples: [6, 8] },
    ]);
  });

  it("leaves a hole where the recording has one", () => {
    const runs = trackRuns(
      trackShape(east(8, (i) => (i === 3 || i === 4 ? { flags: FOIL | FLAG_GAP } : {}))),
      {
        scale,
      },
    );
    expect(runs.map((run) => run.samples)).toEqual([
      [0, 2],
      [5, 7],
    ]);
  });

  it("does not flicker between two bands when the speed trembles on their edge", () => {
    const trembling = east(100, (i) => ({ speed: 3 + (i % 2 === 0 ? 0.05 : -0.05) }));
    expect(trackRuns(trackShape(trembling), { scale })).toHaveLength(1);
  });

  it("shows means from afar: single bumps vanish, a slow kilometre stays", () => {
    const series = east(600, (i) => ({ speed: i % 4 < 2 ? 3.2 : 5.8 }));
    expect(trackRuns(trackShape(series), { scale }).length).toBeGreaterThan(200);
    expect(trackRuns(trackShape(series), { scale, meanOverM: 200 }).map((run) => run.kind)).toEqual([4]);
    const slower = east(600, (i) => ({ speed: i > 200 && i < 400 ? 2.5 : 6.5 }));
    const kinds = trackRuns(trackShape(slower), { scale, meanOverM: 200 }).map((run) => run.kind);
    expect(kinds).toContain(2);
    expect(kinds).toContain(6);
  });

  it("keeps every dropped sample within the tolerance of the drawn line", () => {
    const wavy = seriesOf(
      Array.from({ length: 500 }, (_, i) => ({
        lat: (30 * Math.sin(i / 15)) / DEGREE_M,
        lon: (8 * i) / DEGREE_M,
      })),
    );
    const shape = trackShape(wavy);
    const [run] = trackRuns(shape, { scale, toleranceM: 2 });
    const kept = run?.samples ?? [];
    expect(kept.length).toBeLessThan(150);
    const value = (column: Float64Array, i: number) => column[i] ?? Number.NaN;
    for (let k = 0; k + 1 < kept.length; k += 1) {
      const [a, b] = [kept[k] ?? 0, kept[k + 1] ?? 0];
      const dx = value(shape.eastM, b) - value(shape.eastM, a);
      const dy = value(shape.northM, b) - value(shape.northM, a);
      for (let i = a; i <= b; i += 1) {
        const px = value(shape.eastM, i) - value(shape.eastM, a);
        const py = value(shape.northM, i) - value(shape.northM, a);
        // Distance to the endless line, never more than to the piece of it.
        expect(Math.abs(px * dy - py * dx) / Math.hypot(dx, dy)).toBeLessThanOrEqual(2 + 1e-9);
      }
    }
  });

  it("keeps the same samples as turf's simplify", () => {
    const wavy = seriesOf(
      Array.from({ length: 700 }, (_, i) => ({
        lat: (40 * Math.sin(i / 11) + (i % 5)) / DEGREE_M,
        lon: (6 * i) / DEGREE_M,
      })),
    );
    const shape = trackShape(wavy);
    const [run] = trackRuns(shape, { scale, toleranceM: 2 });
    const points = Array.from(shape.eastM, (east, i) => [east, shape.northM[i] ?? Number.NaN, i]);
    const oracle = simplify(lineString(points), { tolerance: 2, highQuality: true });
    expect(run?.samples).toEqual(oracle.geometry.coordinates.map((point) => point[2]));
  });

  it("draws only the stretch asked for", () => {
    const runs = trackRuns(trackShape(east(20)), {
      scale,
      stretch: { startMs: 1_005_000, endMs: 1_009_000 },
    });
    expect(runs.map((run) => run.samples)).toEqual([[5, 9]]);
  });
});

describe("trackFeatures and trackEnds", () => {
  it("gives one feature a colour, slow to fast", () => {
    const shape = trackShape(east(12, (i) => ({ speed: i < 4 || i >= 8 ? 5.5 : 2.5 })));
    const { features } = trackFeatures(shape, { scale: { lowMps: 0, highMps: SPEED_BANDS } });
    expect(
      features.map(({ properties, geometry }) => [properties.kind, geometry.coordinates.length]),
    ).toEqual([
      [2, 1],
      [5, 2],
    ]);
  });

  it("marks where the drawn track begins and ends", () => {
    const ends = trackEnds(trackShape(east(5, (i) => (i === 0 ? { flags: 0 } : {}))));
    expect(ends.features.map((end) => end.geometry.coordinates[0])).toEqual([10 / DEGREE_M, 40 / DEGREE_M]);
    expect(trackEnds(trackShape(seriesOf([]))).features).toEqual([]);
  });
});

describe("trackSpeedScale", () => {
  it("spans the speeds on foil in whole units and lets a wild one pass", () => {
    const series = east(1000, (i) => ({ speed: i === 500 ? 40 : 6 + (3 * i) / 1000 }));
    // 5th and 98th percentile of 6 to 9 m/s evenly: 6.15 and 8.94.
    expect(trackSpeedScale(series, "m/s")).toEqual({ lowMps: 6, highMps: 9 });
  });

  it("takes speeds on the water when nothing was on foil, and has a scale for nothing at all", () => {
    const slow = east(100, () => ({ speed: 1.5, flags: FLAG_ON_WATER }));
    expect(trackSpeedScale(slow, "m/s").lowMps).toBe(1);
    const scale = trackSpeedScale(seriesOf([]), "kn");
    expect(scale.highMps).toBeGreaterThan(scale.lowMps);
  });
});

describe("nearestSample", () => {
  /** Park and Miller's minimal standard generator (CACM 31(10), 1988), seed 20. */
  function generator(): () => number {
    let state = 20;
    return () => (state = (state * 16807) % 2147483647) / 2147483647;
  }

  function wander(count: number): SpeedSeries {
    const random = generator();
    let [x, y, course] = [0, 0, 0];
    return seriesOf(
      Array.from({ length: count }, () => {
        course += (random() - 0.5) * 0.5;
        x += 8 * Math.sin(course);
        y += 8 * Math.cos(course);
        return { lat: 0.5 + y / DEGREE_M, lon: x / DEGREE_M };
      }),
      250,
    );
  }

  it("finds what a search through all samples finds", () => {
    const shape = trackShape(wander(4000));
    const nearest = nearestSample(shape);
    const random = generator();
    const [west = 0, south = 0, eastEnd = 0, north = 0] = shape.bounds ?? [];
    for (let query = 0; query < 200; query += 1) {
      const lon = west + random() * (eastEnd - west);
      const lat = south + random() * (north - south);
      const radiusM = 20 + 500 * random();
      const middle = [(west + eastEnd) / 2, (south + north) / 2] as const;
      const x = (lon - middle[0]) * DEGREE_M * Math.cos((middle[1] * Math.PI) / 180);
      const y = (lat - middle[1]) * DEGREE_M;
      const away = Array.from(shape.eastM, (e, i) => Math.hypot(e - x, (shape.northM[i] ?? 0) - y));
      const least = Math.min(...away);
      const found = nearest.find(lon, lat, radiusM, null);
      if (least > radiusM) expect(found).toBeNull();
      else expect(away[found ?? -1]).toBeCloseTo(least, 3);
    }
  });

  it("stays on the pass the cursor is on where two lie on one another", () => {
    const there = Array.from({ length: 100 }, (_, i) => ({ lat: 0, lon: (10 * i) / DEGREE_M }));
    const back = [...there].reverse().map(({ lon }) => ({ lat: 1 / DEGREE_M, lon }));
    const nearest = nearestSample(trackShape(seriesOf([...there, ...back])));
    const at30 = [(10 * 30) / DEGREE_M, 0] as const;
    expect(nearest.find(...at30, 50, 28)).toBe(30);
    expect(nearest.find(...at30, 50, 172)).toBe(169);
  });

  it("takes another turn of longitude for the same place, and finds nothing off the track", () => {
    const nearest = nearestSample(trackShape(seriesOf([179.999, -179.999].map((lon) => ({ lat: 0, lon })))));
    expect(nearest.find(180.999 - 1, 0, 50, null)).toBe(0);
    expect(nearest.find(-179.999, 0, 50, null)).toBe(1);
    expect(nearest.find(0, 0, 50, null)).toBeNull();
    expect(nearestSample(trackShape(seriesOf([]))).find(0, 0, 1e6, null)).toBeNull();
  });
});

describe("scaleBarLength", () => {
  it.each([
    // 1 NM = 1852 m, 1 mi = 1609.344 m (SI Brochure, 9th ed.; NIST SP 811).
    [20, "NM", "1\u00a0NM", 1852 / 20],
    [100, "NM", "5\u00a0NM", 9260 / 100],
    [20, "km", "2\u00a0km", 100],
    [2, "NM", "200\u00a0m", 100],
    [4, "NM", "0.2\u00a0NM", 370.4 / 4],
    [0.5, "km", "50\u00a0m", 100],
    [150, "mi", "10\u00a0mi", 16093.44 / 150],
  ] as const)("at %d m a pixel in %s reads %s", (metresPerPx, unit, label, widthPx) => {
    const bar = scaleBarLength(metresPerPx, 110, unit);
    expect(bar?.label).toBe(label);
    expect(bar?.widthPx).toBeCloseTo(widthPx, 9);
  });

  it("has no bar before there is a map", () => {
    expect(scaleBarLength(0, 110, "km")).toBeNull();
    expect(scaleBarLength(Number.NaN, 110, "km")).toBeNull();
  });
});

describe("fitBox", () => {
  it("takes in places beside the track and leaves far ones out", () => {
    const places = [
      { name: "beside", lat: 56.95, lon: 9.1 },
      { name: "far", lat: 50, lon: 9.1 },
    ];
    expect(fitBox([9, 57, 10, 57.4], places)).toEqual([9, 56.95, 10, 57.4]);
    expect(fitBox([179.5, 0, 180.5, 0.4], [{ name: "over the line", lat: 0.2, lon: -179.4 }])[2]).toBeCloseTo(
      180.6,
      9,
    );
  });
});

describe("graticule", () => {
  it("takes a round spacing with at most five lines across the track and goes beyond it", () => {
    const { stepMin, lines } = graticule([9.3, 57.1, 9.7, 57.3]);
    // 0.4 degrees = 24 minutes: 5 minutes apart.
    expect(stepMin).toBe(5);
    const [feature] = lines.features;
    const meridians = (feature?.geometry.coordinates ?? []).filter(([a, b]) => a?.[0] === b?.[0]);
    for (const [position] of meridians) {
      const minutes = (position?.[0] ?? Number.NaN) * 60;
      expect(minutes / 5).toBeCloseTo(Math.round(minutes / 5), 9);
    }
    expect(Math.min(...meridians.map(([position]) => position?.[0] ?? 0))).toBeLessThan(9.3 - 0.4);
  });
});

describe("staticPaths", () => {
  it("fills the frame, north up, at one scale both ways", () => {
    const north = seriesOf([0, 0.01, 0.02].map((lat) => ({ lat, lon: 0 })));
    const drawing = staticPaths(
      trackShape(north),
      { lowMps: 0, highMps: 8 },
      { widthPx: 200, heightPx: 120, marginPx: 10 },
    );
    expect(drawing?.first).toEqual([100, 110]);
    expect(drawing?.last).toEqual([100, 10]);
    expect(drawing?.metresPerPx).toBeCloseTo((0.02 * DEGREE_M) / 100, 6);
    expect(drawing?.paths.map((path) => path.d)).toEqual(["M100 110L100 10"]);
  });

  it("draws somebody who stood still, and nothing when nothing was on the water", () => {
    const frame = { widthPx: 96, heightPx: 60, marginPx: 5 };
    const still = staticPaths(
      trackShape(seriesOf([1, 1, 1].map((lat) => ({ lat, lon: 2 })))),
      { lowMps: 0, highMps: 8 },
      frame,
    );
    expect(still?.first).toEqual([48, 30]);
    expect(staticPaths(trackShape(seriesOf([])), { lowMps: 0, highMps: 8 }, frame)).toBeNull();
  });
});
