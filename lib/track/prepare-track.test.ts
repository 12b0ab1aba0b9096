import { describe, expect, it } from "vitest";

import { fixesOf, makeTrack, type Motion } from "@/tests/support/made-track";

import { prepareTrack } from "./prepare-track";
import type { PreparedTrack } from "./prepared-track";
import type { SmoothedTrack } from "./smoothed-track";

const NO_TRIM = { trim: null };

const columnsOf = (s: SmoothedTrack) => [
  s.latDeg,
  s.lonDeg,
  s.xM,
  s.yM,
  s.vxMps,
  s.vyMps,
  s.speedMps,
  s.speedSeMps,
  s.speedMpsLoose,
  s.gapS,
];

function expectSound(p: PreparedTrack): void {
  const s = p.smoothed;
  for (const column of columnsOf(s)) {
    expect(column).toHaveLength(s.count);
    expect(column.every((value) => Number.isFinite(value))).toBe(true);
  }
  expect(s.onWater).toHaveLength(s.count);
  expect(s.speedMpsLoose.every((v) => v >= 0)).toBe(true);
  expect(s.speedSeMps.every((se) => se >= 0)).toBe(true);
  expect(p.window.endMs).toBeGreaterThanOrEqual(p.window.startMs);
  p.waterSessions.forEach((w, i) => {
    expect(w.endMs).toBeGreaterThan(w.startMs);
    if (i > 0) expect(w.startMs).toBeGreaterThan(p.waterSessions[i - 1]?.endMs ?? Infinity);
  });
}

const mean = (values: ArrayLike<number>, from: number, to: number) => {
  let sum = 0;
  for (let i = from; i < to; i++) sum += values[i] ?? NaN;
  return sum / (to - from);
};

/** The way on the water outside long holes, by the sum of speed over time. */
function wayM(s: SmoothedTrack): number {
  let way = 0;
  for (let k = 0; k < s.count; k++) {
    if (s.onWater[k] && (s.gapS[k] ?? 0) <= 30) way += ((s.speedMpsLoose[k] ?? NaN) * s.stepMs) / 1000;
  }
  return way;
}

describe("closed forms", () => {
  it.each([0.5, 1, 5, 10])(
    "a straight run at constant speed without noise comes back exactly at %d Hz",
    (hz) => {
      const { fixes } = makeTrack(() => ({ speedMps: 7, courseDeg: 33 }), { seconds: 400, hz });
      const { smoothed: s } = prepareTrack(fixes, NO_TRIM);
      // Away from the ends the smoother must not change a line; 1e-4 m/s is a step's rounding of whole milliseconds and degrees.
      for (let k = Math.floor(s.count * 0.2); k < s.count * 0.8; k++) {
        expect(Math.abs((s.speedMps[k] ?? NaN) - 7)).toBeLessThan(1e-3);
      }
      expect(mean(s.vxMps, 100, s.count - 100) / mean(s.vyMps, 100, s.count - 100)).toBeCloseTo(
        Math.tan((33 * Math.PI) / 180),
        2,
      );
    },
  );

  it.each([
    [1, 1],
    [1, 1.7],
    [5, 1.7],
    [1, 3.4],
  ])("at %d Hz and %d m noise the speed is right within its standard error", (hz, noiseM) => {
    const z: number[] = [];
    for (let seed = 1; seed <= 4; seed++) {
      const made = makeTrack(
        (t) => ({ speedMps: 7 + 1.2 * Math.sin(t / 1.6), courseDeg: 60 + 8 * Math.sin(t / 5) }),
        {
          seconds: 600,
          hz,
          noiseM,
          seed,
        },
      );
      const { smoothed: s, quality } = prepareTrack(made.fixes, NO_TRIM);
      // The noise scale is promised within 15 % on steady riding; four of its own errors are allowed here.
      expect(quality.noiseM / noiseM).toBeGreaterThan(0.7);
      expect(quality.noiseM / noiseM).toBeLessThan(1.4);
      made.trueSpeedMps.forEach((v, i) => {
        const k = Math.round(((made.fixes.timeMs[i] ?? NaN) - s.startMs) / s.stepMs);
        if (i > 30 * hz && i < 570 * hz) z.push(((s.speedMps[k] ?? NaN) - v) / (s.speedSeMps[k] ?? NaN));
      });
    }
    const rms = Math.sqrt(z.reduce((sum, x) => sum + x * x, 0) / z.length);
    // Honest errors have root mean square 1; the motion is not the model's, so between 0.6 and 1.4.
    expect(rms).toBeGreaterThan(0.6);
    expect(rms).toBeLessThan(1.4);
  });

  it.each([1, 10])("five decimals in the file cost little at %d Hz and are not taken for noise", (hz) => {
    const made = makeTrack((t) => ({ speedMps: 7 + 1.2 * Math.sin(t / 1.6), courseDeg: 60 }), {
      seconds: 900,
      hz,
      noiseM: 1.7,
      seed: 3,
    });
    const rounded = {
      ...made.fixes,
      latDeg: made.fixes.latDeg.map((v) => Math.round(v * 1e5) / 1e5),
      lonDeg: made.fixes.lonDeg.map((v) => Math.round(v * 1e5) / 1e5),
    };
    const rms = (p: PreparedTrack) => {
      let sum = 0;
      made.trueSpeedMps.forEach((v, i) => {
        const k = Math.round(((made.fixes.timeMs[i] ?? NaN) - p.smoothed.startMs) / p.smoothed.stepMs);
        sum += ((p.smoothed.speedMps[k] ?? NaN) - v) ** 2;
      });
      return Math.sqrt(sum / made.trueSpeedMps.length);
    };
    const fine = prepareTrack(made.fixes, NO_TRIM);
    const coarse = prepareTrack(rounded, NO_TRIM);
    // Rounding adds 0.25 m a fix (uniform over 1.1 m north, 0.6 m east), beside 0.6 m of fast and white noise.
    expect(coarse.quality.noiseM / fine.quality.noiseM).toBeLessThan(1.35);
    expect(rms(coarse)).toBeLessThan(1.25 * rms(fine));
  });

  it("receiver speed makes the speed better, and a speed in another unit is refused in words", () => {
    const motion: Motion = (t) => ({ speedMps: 7 + 1.2 * Math.sin(t / 1.6), courseDeg: 60 });
    const made = makeTrack(motion, { seconds: 900, noiseM: 1.7, receiverSpeed: true });
    const error = (p: PreparedTrack) => {
      let sum = 0;
      made.trueSpeedMps.forEach((v, i) => {
        const k = Math.round(((made.fixes.timeMs[i] ?? NaN) - p.smoothed.startMs) / p.smoothed.stepMs);
        sum += ((p.smoothed.speedMps[k] ?? NaN) - v) ** 2;
      });
      return Math.sqrt(sum / made.trueSpeedMps.length);
    };
    const plain = prepareTrack({ ...made.fixes, receiverSpeedMps: null }, NO_TRIM);
    const better = prepareTrack(made.fixes, NO_TRIM);
    const knots = made.fixes.receiverSpeedMps?.map((v) => v / 0.5144) ?? null;
    const refused = prepareTrack({ ...made.fixes, receiverSpeedMps: knots }, NO_TRIM);
    expect(better.quality.receiverSpeedUsed).toBe(true);
    expect(error(better)).toBeLessThan(0.6 * error(plain));
    expect(refused.quality.receiverSpeedUsed).toBe(false);
    expect(refused.quality.notes.map((n) => n.code)).toContain("receiver_speed_ignored");
    expect(error(refused)).toBeCloseTo(error(plain), 12);
  });

  it("a receiver at rest does not travel", () => {
    for (let seed = 1; seed <= 5; seed++) {
      const { fixes } = makeTrack(() => ({ speedMps: 0, courseDeg: 0 }), {
        seconds: 1800,
        noiseM: 1.7,
        seed,
      });
      const p = prepareTrack(fixes, NO_TRIM);
      const way = wayM(p.smoothed);
      // Raw steps add up to 1 m a second or so, 1.5 to 2 km in this half hour; the gate leaves its rare slips.
      expect(way).toBeLessThan(40);
      expect(p.rawLengthM).toBeGreaterThan(700);
    }
  });

  it("the way of a weaving run is right to half a percent under noise", () => {
    const made = makeTrack(
      (t) => ({
        speedMps: 7 + 1.5 * Math.sin((2 * Math.PI * t) / 6),
        courseDeg: 80 + 8 * Math.sin((2 * Math.PI * t) / 9),
      }),
      { seconds: 1800, noiseM: 1.7, seed: 11 },
    );
    const p = prepareTrack(made.fixes, NO_TRIM);
    const way = wayM(p.smoothed);
    expect(Math.abs(way / made.trueWayM - 1)).toBeLessThan(0.005);
  });
});

describe("times on the water", () => {
  // Rest, walk of 40 s at 1.1 m/s, paddle, ride for ten minutes, paddle, walk, rest.
  const session: Motion = (t) => {
    const at = (speedMps: number) => ({ speedMps, courseDeg: 70 });
    if (t < 180) return at(0);
    if (t < 220) return at(1.1);
    if (t < 280) return at(1.5 + 0.4 * Math.sin(t));
    if (t < 880) return at(6.5 + Math.sin(t / 1.5));
    if (t < 940) return at(1.5 + 0.4 * Math.sin(t));
    if (t < 980) return at(1.1);
    return at(0);
  };

  it("leaves out rest and, to tens of seconds, the walk", () => {
    const made = makeTrack(session, { seconds: 1200, noiseM: 1 });
    const p = prepareTrack(made.fixes, NO_TRIM);
    const t0 = made.fixes.timeMs[0] ?? NaN;
    expect(p.waterSessions).toHaveLength(1);
    // Walking and paddling out overlap in speed: an error of the walk's own length is inherent, the ride is not touched.
    expect(Math.abs(((p.waterSessions[0]?.startMs ?? NaN) - t0) / 1000 - 220)).toBeLessThan(45);
    expect(Math.abs(((p.waterSessions[0]?.endMs ?? NaN) - t0) / 1000 - 940)).toBeLessThan(45);
  });

  it("cuts off the drive there and back", () => {
    const made = makeTrack(
      (t) => {
        if (t < 600) return { speedMps: 18 + 4 * Math.sin(t / 40), courseDeg: 200 };
        if (t < 1900) return session(t - 650);
        return { speedMps: 18 + 4 * Math.sin(t / 40), courseDeg: 20 };
      },
      { seconds: 2500, noiseM: 1 },
    );
    const p = prepareTrack(made.fixes, NO_TRIM);
    const t0 = made.fixes.timeMs[0] ?? NaN;
    expect(p.quality.notes.find((n) => n.code === "drive")?.count).toBe(2);
    expect(p.window.startMs).toBeGreaterThan(t0 + 780_000);
    expect(p.window.endMs).toBeLessThan(t0 + 1_690_000);
  });

  it("keeps the runs of a fast wing session", () => {
    // Legs of two minutes at 13 m/s (25 kn) with falls between them.
    const made = makeTrack(
      (t) => ({ speedMps: t % 150 < 120 ? 13 : 0.4, courseDeg: t % 300 < 150 ? 80 : 260 }),
      {
        seconds: 1800,
        noiseM: 1,
      },
    );
    const p = prepareTrack(made.fixes, NO_TRIM);
    const kept = p.waterSessions.reduce((sum, w) => sum + w.endMs - w.startMs, 0) / 1000;
    expect(kept).toBeGreaterThan(1700);
  });

  it("keeps a slow boat whole but for the rest at its ends", () => {
    const made = makeTrack((t) => ({ speedMps: t < 300 || t > 2100 ? 0 : 1.6, courseDeg: 120 }), {
      seconds: 2400,
      noiseM: 1,
    });
    const p = prepareTrack(made.fixes, NO_TRIM);
    const way = wayM(p.smoothed);
    expect(Math.abs(way / (1800 * 1.6) - 1)).toBeLessThan(0.02);
    expect(p.quality.notes.map((n) => n.code)).toContain("slow");
  });

  it("holds to the rider's own ends on both sides", () => {
    const made = makeTrack(session, { seconds: 1200, noiseM: 1 });
    const t0 = made.fixes.timeMs[0] ?? NaN;
    const trim = { startMs: t0 + 100_000, endMs: t0 + 500_000 };
    const p = prepareTrack(made.fixes, { trim });
    expect(p.window).toEqual(trim);
    expect(p.waterSessions).toEqual([trim]);
    const outside = p.smoothed.onWater[Math.round((trim.endMs - p.smoothed.startMs) / p.smoothed.stepMs) + 1];
    expect(outside).toBe(0);
  });

  it("takes a hillside for land unless the rider sets the ends", () => {
    const made = makeTrack(() => ({ speedMps: 5, courseDeg: 10 }), { seconds: 1800 });
    const elevationM = Float64Array.from({ length: made.fixes.count }, (_, i) => 400 - i * 0.2);
    const p = prepareTrack({ ...made.fixes, elevationM }, NO_TRIM);
    expect(p.waterSessions).toEqual([]);
    expect(p.quality.notes.map((n) => n.code)).toContain("land");
    const t0 = made.fixes.timeMs[0] ?? NaN;
    const trim = { startMs: t0, endMs: t0 + 600_000 };
    expect(prepareTrack({ ...made.fixes, elevationM }, { trim }).waterSessions).toEqual([trim]);
  });
});

describe("whatever the data", () => {
  const T = Date.UTC(2025, 5, 14);
  const many = (n: number, f: (i: number) => number) => Array.from({ length: n }, (_, i) => f(i));

  it.each([
    ["no fix", fixesOf([], [], [])],
    ["one fix", fixesOf([T], [57], [9])],
    ["two fixes", fixesOf([T, T + 1000], [57, 57.00005], [9, 9])],
    ["two fixes a day apart", fixesOf([T, T + 86_000_000], [57, 57.5], [9, 9])],
    [
      "equal times",
      fixesOf(
        many(50, () => T),
        many(50, (i) => 57 + i / 1e5),
        many(50, () => 9),
      ),
    ],
    [
      "equal places",
      fixesOf(
        many(500, (i) => T + i * 1000),
        many(500, () => 57),
        many(500, () => 9),
      ),
    ],
    [
      "only nonsense",
      fixesOf(
        many(50, () => NaN),
        many(50, () => 500),
        many(50, () => Infinity),
      ),
    ],
    [
      "times running backwards",
      fixesOf(
        many(100, (i) => T - i * 1000),
        many(100, (i) => 57 + i / 1e5),
        many(100, () => 9),
      ),
    ],
    [
      "years 1970 to 2099",
      fixesOf(
        many(130, (i) => Date.UTC(1970 + i, 0, 1)),
        many(130, (i) => i / 2),
        many(130, (i) => i),
      ),
    ],
    [
      "a hole of a year",
      fixesOf(
        many(600, (i) => T + i * 1000 + (i > 300 ? 3.2e10 : 0)),
        many(600, (i) => 57 + i / 2e4),
        many(600, () => 9),
      ),
    ],
    [
      "a place anew every second",
      fixesOf(
        many(2000, (i) => T + i * 1000),
        many(2000, (i) => ((i * 7919) % 170) - 85),
        many(2000, (i) => ((i * 104729) % 360) - 180),
      ),
    ],
    [
      "milliseconds apart",
      fixesOf(
        many(2000, (i) => T + i),
        many(2000, (i) => 57 + i / 1e8),
        many(2000, () => 9),
      ),
    ],
    [
      "a fix every ten minutes",
      fixesOf(
        many(100, (i) => T + i * 600_000),
        many(100, (i) => 57 + i / 100),
        many(100, () => 9),
      ),
    ],
  ])("%s: sound columns, no throw, an answer within seconds", (_, fixes) => {
    const before = performance.now();
    expectSound(prepareTrack(fixes, NO_TRIM));
    expect(performance.now() - before).toBeLessThan(3000);
  });

  it.each([
    ["over the antimeridian", { latDeg: -17, lonDeg: 179.99 }],
    ["over the pole", { latDeg: 89.99, lonDeg: 20 }],
    ["across the equator and Greenwich", { latDeg: -0.005, lonDeg: -0.005 }],
  ])("%s the speed stays right", (_, start) => {
    const made = makeTrack(() => ({ speedMps: 8, courseDeg: 60 }), { seconds: 600, noiseM: 0.8, start });
    const p = prepareTrack(made.fixes, NO_TRIM);
    expectSound(p);
    // Noise across the course makes a mean speed long by its variance over twice the speed: 0.01 m/s here, some more
    // where the frame turns at the pole.
    expect(Math.abs(mean(p.smoothed.speedMps, 200, p.smoothed.count - 200) - 8)).toBeLessThan(0.1);
  });

  it("a hole is marked and the path goes straight over it", () => {
    const made = makeTrack(() => ({ speedMps: 6, courseDeg: 90 }), { seconds: 900, noiseM: 0.8 });
    const keep = many(901, (i) => i).filter((i) => i < 300 || i >= 400);
    const pick = (c: Float64Array) => keep.map((i) => c[i] ?? NaN);
    const p = prepareTrack(
      fixesOf(pick(made.fixes.timeMs), pick(made.fixes.latDeg), pick(made.fixes.lonDeg)),
      NO_TRIM,
    );
    expectSound(p);
    const inHole = 350 * 4;
    expect(p.smoothed.gapS[inHole]).toBe(101);
    expect(p.smoothed.speedMps[inHole]).toBeCloseTo(6, 0);
    expect(p.quality.gapCount).toBe(1);
  });
});
