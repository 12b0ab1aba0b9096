import fc from "fast-check";
import { gzipSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { ParseError } from "@/lib/errors/parse-error";
import { seededRng } from "@/lib/numeric/rng";
import { decodeSeries, encodeSeries, SERIES_STEPS } from "./series-blob";
import type { SpeedSeries } from "./speed-series";

const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const orMissing = (arb: fc.Arbitrary<number>) =>
  fc.oneof({ weight: 5, arbitrary: arb }, { weight: 1, arbitrary: fc.constant(NaN) });

const anySeries: fc.Arbitrary<SpeedSeries> = fc
  .record({
    rows: fc.array(
      fc.record({
        lat: orMissing(finite(-90, 90)),
        lon: orMissing(finite(-180, 180)),
        speed: orMissing(finite(0, 100)),
        se: orMissing(finite(0, 50)),
        course: orMissing(finite(0, 359.999)),
        step: finite(0, 500),
        heart: orMissing(finite(25, 250)),
        flags: fc.integer({ min: 0, max: 7 }),
      }),
      { maxLength: 60 },
    ),
    startMs: finite(-1e13, 1e13),
    stepMs: finite(20, 1000),
    withHeart: fc.boolean(),
  })
  .map(({ rows, startMs, stepMs, withHeart }) => {
    let way = 0;
    return {
      startMs,
      stepMs,
      count: rows.length,
      latDeg: Float64Array.from(rows, (r) => r.lat),
      lonDeg: Float64Array.from(rows, (r) => r.lon),
      speedMps: Float32Array.from(rows, (r) => r.speed),
      speedSeMps: Float32Array.from(rows, (r) => r.se),
      courseDeg: Float32Array.from(rows, (r) => r.course),
      distanceM: Float64Array.from(rows, (r) => (way += r.step)),
      heartRateBpm: withHeart ? Float32Array.from(rows, (r) => r.heart) : null,
      flags: Uint8Array.from(rows, (r) => r.flags),
    };
  });

/** Half a step, and the last digit of the doubles and floats the values are kept in. */
function expectWithin(got: ArrayLike<number>, want: ArrayLike<number>, step: number, turn = 0): void {
  expect(got.length).toBe(want.length);
  for (let i = 0; i < want.length; i += 1) {
    const a = got[i] ?? NaN;
    const b = want[i] ?? NaN;
    if (Number.isNaN(b)) expect(a).toBeNaN();
    else {
      const apart = Math.abs(a - b);
      expect(turn > 0 ? Math.min(apart, turn - apart) : apart).toBeLessThanOrEqual(
        step / 2 + 1e-7 * Math.max(1, Math.abs(b)) * (step < 1e-6 ? 1e-4 : 1),
      );
    }
  }
}

describe("the series blob", () => {
  test("gives every column back within half a step of what is stated", () => {
    fc.assert(
      fc.property(anySeries, fc.boolean(), (series, packed) => {
        const bytes = encodeSeries(series);
        const back = decodeSeries(packed ? gzipSync(bytes) : bytes);
        expect(back.startMs).toBe(series.startMs);
        expect(back.stepMs).toBe(series.stepMs);
        expectWithin(back.latDeg, series.latDeg, SERIES_STEPS.positionDeg);
        expectWithin(back.lonDeg, series.lonDeg, SERIES_STEPS.positionDeg);
        expectWithin(back.speedMps, series.speedMps, SERIES_STEPS.speedMps);
        expectWithin(back.speedSeMps, series.speedSeMps, SERIES_STEPS.speedMps);
        expectWithin(back.courseDeg, series.courseDeg, SERIES_STEPS.courseDeg, 360);
        expectWithin(back.distanceM, series.distanceM, SERIES_STEPS.distanceM);
        expect(back.heartRateBpm === null).toBe(series.heartRateBpm === null);
        if (back.heartRateBpm !== null && series.heartRateBpm !== null) {
          expectWithin(back.heartRateBpm, series.heartRateBpm, SERIES_STEPS.heartRateBpm);
        }
        expect([...back.flags]).toEqual([...series.flags]);
      }),
      { seed: 20250614, numRuns: 200 },
    );
  });

  test("keeps a distance that never falls from falling, and courses within 0 to 360", () => {
    fc.assert(
      fc.property(anySeries, (series) => {
        const back = decodeSeries(encodeSeries(series));
        for (let i = 1; i < back.count; i += 1) {
          expect(back.distanceM[i]).toBeGreaterThanOrEqual(back.distanceM[i - 1] ?? NaN);
        }
        for (const course of back.courseDeg)
          if (!Number.isNaN(course)) expect(course >= 0 && course < 360).toBe(true);
      }),
      { seed: 3, numRuns: 100 },
    );
  });

  test("says so by ParseError, and only so, when bytes are cut, changed or not its own", () => {
    fc.assert(
      fc.property(anySeries, fc.nat(), fc.nat({ max: 255 }), (series, where, value) => {
        const bytes = encodeSeries(series);
        expect(() => decodeSeries(bytes.subarray(0, where % bytes.length))).toThrow(ParseError);
        const changed = Uint8Array.from(bytes);
        changed[where % bytes.length] = value;
        try {
          decodeSeries(changed);
        } catch (error) {
          expect(error).toBeInstanceOf(ParseError);
        }
      }),
      { seed: 5, numRuns: 300 },
    );
    const header = encodeSeries(decodeSeries(encodeSeries(emptySeries())));
    expect(() => decodeSeries(new Uint8Array([...header, 0]))).toThrow("longer");
    expect(() => decodeSeries(gzipSync(header).subarray(0, 20))).toThrow(ParseError);
  });

  test("holds four hours at 10 Hz of a noisy ride in under 0.9 MB", () => {
    const bytes = gzipSync(encodeSeries(noisyRide(144_000, 100)));
    expect(bytes.length).toBeLessThan(900_000);
  });

  test("holds forty hours at 1 Hz of a noisy ride in under 1 MB, two thirds of what a page may be sent", () => {
    const bytes = gzipSync(encodeSeries(noisyRide(144_000, 1000)));
    expect(bytes.length).toBeLessThan(1_000_000);
  });
});

function emptySeries(): SpeedSeries {
  return { ...noisyRide(0, 1000), heartRateBpm: null };
}

/** Speed swinging about 8 m/s by a swell of 7 s with random surges, course wandering: rougher than a smoothed track. */
function noisyRide(count: number, stepMs: number): SpeedSeries {
  const rng = seededRng(42);
  const columns = {
    latDeg: new Float64Array(count),
    lonDeg: new Float64Array(count),
    speedMps: new Float32Array(count),
    speedSeMps: new Float32Array(count),
    courseDeg: new Float32Array(count),
    distanceM: new Float64Array(count),
    heartRateBpm: new Float32Array(count),
    flags: new Uint8Array(count),
  };
  const dt = stepMs / 1000;
  let lat = 57.2;
  let lon = 9.3;
  let course = 70;
  let surge = 0;
  let way = 0;
  for (let i = 0; i < count; i += 1) {
    surge += (rng() - 0.5) * 0.8 * Math.sqrt(dt) - 0.1 * dt * surge;
    course += (rng() - 0.5) * 6 * Math.sqrt(dt) + 0.05 * dt * (70 - course);
    const speed = 8 + 1.2 * Math.sin((2 * Math.PI * i * dt) / 7) + surge;
    way += speed * dt;
    lat += (speed * dt * Math.cos((course * Math.PI) / 180)) / 111_300;
    lon += (speed * dt * Math.sin((course * Math.PI) / 180)) / 60_400;
    columns.latDeg[i] = lat;
    columns.lonDeg[i] = lon;
    columns.speedMps[i] = speed;
    columns.speedSeMps[i] = 0.2 + 0.01 * Math.sin(i / 50);
    columns.courseDeg[i] = ((course % 360) + 360) % 360;
    columns.distanceM[i] = way;
    columns.heartRateBpm[i] = 140 + Math.round(20 * Math.sin(i / 300));
    columns.flags[i] = Math.sin(i / 900) > -0.5 ? 6 : 2;
  }
  return { startMs: Date.UTC(2025, 5, 14, 11), stepMs, count, ...columns };
}
