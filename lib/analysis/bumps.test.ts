import { describe, expect, it } from "vitest";
import { smoothedTrackFromSpeed } from "@/tests/support/smoothed-track-from-speed";
import { energyHeightM, findBumps, STANDARD_GRAVITY_MPS2 } from "./bumps";
import { glideFigures } from "./glide";
import { seededRng } from "@/lib/numeric/rng";
import { cumulatedWayM, foilMask } from "./way";

/** Speed between 5 and 7 m/s in straight lines: up in 4 s, down in 4 s. */
const sawtooth = (t: number): number => {
  const phase = t % 8;
  return phase < 4 ? 5 + phase / 2 : 7 - (phase - 4) / 2;
};

function bumpsOf(speed: (t: number) => number, lastsS: number, seMps = 0) {
  const track = smoothedTrackFromSpeed(speed, lastsS, { seMps });
  const spans = [{ start: 0, end: track.count - 1, confidence: 1 }];
  return { track, ...findBumps(track, spans, cumulatedWayM(track, foilMask(track, spans))) };
}

describe("findBumps", () => {
  it("finds each tooth of a sawtooth as one bump ride of 2 m/s gain", () => {
    const { bumpRides, track } = bumpsOf(sawtooth, 80);
    expect(bumpRides).toHaveLength(10);
    bumpRides.forEach((ride, k) => {
      expect((ride.peakMs - track.startMs) / 1000).toBe(8 * k + 4);
      expect(ride.gainMps).toBeCloseTo(2, 12);
      expect(ride.speedMpsPeak).toBe(7);
    });
  });

  it("lets a bump ride run from the middle of the rise to the middle of the fall", () => {
    const { bumpRides, track } = bumpsOf(sawtooth, 80);
    const ride = bumpRides[3];
    // The middle between 5 and 7 is 6, passed 2 s after the lull and 2 s before the next: 4 s at 6.5 m/s on average.
    expect(((ride?.startMs ?? 0) - track.startMs) / 1000).toBeCloseTo(26, 9);
    expect(((ride?.endMs ?? 0) - track.startMs) / 1000).toBeCloseTo(30, 9);
    expect(ride?.distanceM).toBeCloseTo(26, 9);
  });

  it("passes over swings below half a metre a second, and below three standard errors of a difference", () => {
    const ripple = (t: number): number => 6 + 0.2 * Math.sin(t);
    expect(bumpsOf(ripple, 60).bumpRides).toEqual([]);
    const small = (t: number): number => 6 + 0.35 * Math.sin(t);
    expect(bumpsOf(small, 60).bumpRides.length).toBeGreaterThan(5);
    expect(bumpsOf(small, 60, 0.2).bumpRides).toEqual([]);
  });

  it("leaves out a peak that the touchdown cuts off", () => {
    expect(bumpsOf((t) => 5 + t / 4, 12).bumpRides).toEqual([]);
  });

  it("counts a lull as kept unless the time on foil ends within 2 s of it", () => {
    // 78 s: the last lull would be at 80, the speed has fallen by 1 m/s at the touchdown.
    expect(bumpsOf(sawtooth, 78).lulls.map((lull) => lull.keptFoil)).toEqual([
      ...Array.from({ length: 9 }, () => true),
      false,
    ]);
  });
});

/**
 * Coasting without push at a glide ratio of 12: energy height falls by a metre every 12 m, so v dv/ds = -g / 12 and
 * the deceleration is g / 12 at any speed (closed form).
 */
const coast = (t: number): number => {
  const phase = t % 14;
  const deceleration = STANDARD_GRAVITY_MPS2 / 12;
  return phase < 4
    ? 8.5 - 4 * deceleration + phase * deceleration
    : 8.5 - ((phase - 4) * 4 * deceleration) / 10;
};

describe("glideFigures", () => {
  it("is the glide ratio of a coast in closed form, pooled over lulls", () => {
    // The fall takes 10 s for what the rise takes 4: its deceleration is 0.4 g / 12, a glide ratio of 30.
    const { lulls } = bumpsOf(coast, 140);
    const glide = glideFigures(lulls, seededRng(1));
    expect(lulls.length).toBeGreaterThanOrEqual(9);
    // 1e-3: straight pieces of a quarter of a second.
    expect((glide?.ratio ?? 0) / 30).toBeCloseTo(1, 3);
    expect(glide?.ratioLow).toBeLessThanOrEqual(glide?.ratio ?? 0);
    expect(glide?.ratioHigh).toBeGreaterThanOrEqual(glide?.ratio ?? 0);
  });

  it("says nothing from fewer than five lulls", () => {
    const lull = { startMs: 0, endMs: 1, distanceM: 10, heightLostM: 1, keptFoil: true };
    expect(glideFigures([lull, lull, lull, lull], seededRng(1))).toBeNull();
  });

  it("gives an interval of no width when all lulls agree, and the same one twice when they do not", () => {
    const lull = (way: number) => ({ startMs: 0, endMs: 1, distanceM: way, heightLostM: 1, keptFoil: true });
    const same = glideFigures(
      Array.from({ length: 8 }, () => lull(11)),
      seededRng(1),
    );
    expect([same?.ratioLow, same?.ratio, same?.ratioHigh]).toEqual([11, 11, 11]);
    const mixed = [8, 9, 10, 11, 12, 13].map(lull);
    expect(glideFigures(mixed, seededRng(5))).toEqual(glideFigures(mixed, seededRng(5)));
  });

  it("has the energy height of a fall from rest: v = sqrt(2 g h)", () => {
    expect(energyHeightM(Math.sqrt(2 * STANDARD_GRAVITY_MPS2 * 3.5))).toBeCloseTo(3.5, 12);
  });
});
