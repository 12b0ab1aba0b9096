import { describe, expect, it } from "vitest";
import { seededRng, standardNormal } from "@/lib/numeric/rng";
import { burstVarianceM2 } from "./find-bursts";
import { gapLimitS } from "./gap-limit";
import { splitWhite } from "./white-noise";

/** A straight way at 7 m/s, one fix a second, with an error a fix. */
function pathOf(count: number, error: (i: number) => readonly [number, number]) {
  const errors = Array.from({ length: count }, (_, i) => error(i));
  return {
    count,
    timeS: Float64Array.from({ length: count }, (_, i) => i),
    xM: Float64Array.from(errors, ([x], i) => 7 * i + x),
    yM: Float64Array.from(errors, ([, y]) => y),
  };
}

describe("burstVarianceM2", () => {
  const rng = seededRng(5);
  const small = () => 0.2 * standardNormal(rng);

  it("doubts the fixes of a burst and no others", () => {
    const path = pathOf(400, (i) => {
      const off = i >= 200 && i < 208 ? 9 + 3 * standardNormal(rng) : 0;
      return [small() + off, small()];
    });
    const variance = burstVarianceM2(path, 1);
    const doubted = Array.from(variance ?? []).flatMap((v, i) => (v > 0 ? [i] : []));
    expect(doubted.filter((i) => i >= 201 && i <= 206)).toHaveLength(6);
    expect(doubted.every((i) => i > 190 && i < 218)).toBe(true);
  });

  it("doubts nothing of a rider who falls from 7 m/s within a second and of one who turns at 30 degrees a second", () => {
    const fall = pathOf(200, (i) => [small() - (i > 100 ? 7 * (i - 100) : 0), small()]);
    expect(burstVarianceM2(fall, 1)).toBeNull();
    const turn = pathOf(200, () => [0, 0]);
    let heading = 0;
    for (let i = 1; i < 200; i++) {
      if (i > 100 && i <= 106) heading += Math.PI / 6;
      turn.xM[i] = (turn.xM[i - 1] ?? 0) + 7 * Math.cos(heading) + 0.5 * small();
      turn.yM[i] = (turn.yM[i - 1] ?? 0) + 7 * Math.sin(heading) + 0.5 * small();
    }
    expect(burstVarianceM2(turn, 1)).toBeNull();
  });
});

describe("splitWhite", () => {
  it("finds most of a white error of 1.6 m and leaves correlated noise to the usual shape", () => {
    const rng = seededRng(8);
    const white = pathOf(2000, () => [1.6 * standardNormal(rng), 1.6 * standardNormal(rng)]);
    // The usual shape would need a scale of 6 m to explain such differences.
    const split = splitWhite(white, 1, 6);
    expect(Math.sqrt(split.whiteM2)).toBeGreaterThan(1.2);
    expect(Math.sqrt(split.whiteM2)).toBeLessThan(1.9);
    expect(split.scaleM).toBeLessThan(2.5);
    const axes = [0, 0];
    const keep = Math.exp(-1 / 3);
    const fast = pathOf(2000, () => {
      for (const a of [0, 1])
        axes[a] = keep * (axes[a] ?? 0) + 0.6 * Math.sqrt(1 - keep * keep) * standardNormal(rng);
      return [(axes[0] ?? 0) + 0.2 * standardNormal(rng), (axes[1] ?? 0) + 0.2 * standardNormal(rng)];
    });
    expect(splitWhite(fast, 1, 1.7)).toEqual({ scaleM: 1.7, whiteM2: 0 });
  });
});

describe("gapLimitS", () => {
  const timesOf = (steps: readonly number[]) => {
    let t = 0;
    return Float64Array.from([0, ...steps.map((step) => (t += 1000 * step))]);
  };

  it("is 5 s at 1 Hz, four steps of a slow recording, and beyond the long steps of an uneven one", () => {
    expect(gapLimitS(timesOf(new Array<number>(100).fill(1)))).toBe(5);
    expect(gapLimitS(timesOf(new Array<number>(100).fill(3)))).toBe(12);
    const uneven = Array.from({ length: 100 }, (_, i) => (i % 4 === 0 ? 6 : 1));
    expect(gapLimitS(timesOf(uneven))).toBe(9);
    expect(gapLimitS(new Float64Array(0))).toBe(5);
  });
});
