import { readFileSync } from "node:fs";
import path from "node:path";

import { describe, expect, it } from "vitest";

import { movingMean } from "./moving-mean";
import { median, quantile } from "./quantile";
import { seededRng, standardNormal } from "./rng";
import { runs } from "./runs";
import { turningPoints } from "./turning-points";

const read = (name: string) =>
  JSON.parse(
    readFileSync(path.resolve(import.meta.dirname, "../../fixtures/checks", name), "utf8"),
  ) as unknown;

type Described = {
  median: number;
  quantiles: { p: number[]; type7: number[] };
};
const statistics = read("statistics.json") as {
  samples: Record<"A" | "B", number[]>;
  describe: Record<"A" | "B", Described>;
  even_odd: { median_even: number; median_odd: number; q_single: number[]; q_two: number[] };
};

describe("quantiles", () => {
  // Source: R 4.2.2, quantile(type = 7), median (fixtures/checks/statistics.json). Printed to 15 digits.
  it.each(["A", "B"] as const)("of sample %s are R's of type 7, with its median", (name) => {
    const sample = statistics.samples[name];
    const expected = statistics.describe[name];
    expected.quantiles.p.forEach((p, i) => {
      expect(quantile(sample, p)).toBeCloseTo(expected.quantiles.type7[i] ?? NaN, 12);
    });
    expect(median(sample)).toBeCloseTo(expected.median, 12);
  });

  it("do not change their input and give NaN for nothing, for NaN and for a p outside 0 to 1", () => {
    const sample = [3, 1, 2];
    quantile(sample, 0.5);
    expect(sample).toEqual([3, 1, 2]);
    expect(quantile([], 0.5)).toBeNaN();
    expect(quantile([1, NaN, 2], 0.5)).toBeNaN();
    expect(quantile([1, Infinity], 0.5)).toBeNaN();
    expect(quantile([1, 2], 1.1)).toBeNaN();
  });
});

describe("the moving median", () => {
  const block = (
    read("signals.json") as {
      median_filter: { signal: number[]; outputs: { kernel: number; output: number[] }[] };
    }
  ).median_filter;

  // Source: scipy 1.10.1 median filter, mode nearest (fixtures/checks/signals.json): the median of a window of values.
  it.each(block.outputs)("of kernel $kernel is the reference away from the ends", ({ kernel, output }) => {
    const half = (kernel - 1) / 2;
    for (let i = half; i < block.signal.length - half; i++) {
      expect(median(block.signal.slice(i - half, i + half + 1))).toBeCloseTo(output[i] ?? NaN, 12);
    }
  });
});

describe("turning points", () => {
  const { peaks } = read("signals.json") as {
    peaks: {
      signal: number[];
      all_peaks_with_prominence: { peak: number; prominence: number }[];
    };
  };

  // Source: scipy 1.10.1 find_peaks with prominences (fixtures/checks/signals.json). A zig-zag of swing s confirms just the
  // peaks of prominence s or more; a top at either end of the signal is a turn for the zig-zag but no peak for the table.
  it.each([1.5, 2.5, 4.5])("with a swing of %d are the peaks of that prominence", (swing) => {
    const last = peaks.signal.length - 1;
    const found = turningPoints(peaks.signal, swing, { from: 0, to: last })
      .filter((p) => p.kind === "peak" && (peaks.signal[p.index] ?? 0) < 8)
      .map((p) => peaks.signal[p.index]);
    const expected = peaks.all_peaks_with_prominence
      .filter((p) => p.prominence >= swing)
      .map((p) => peaks.signal[p.peak]);
    expect(found).toEqual(expected);
  });

  it("alternate and lie a swing apart on a random walk", () => {
    const rng = seededRng(7);
    const series: number[] = [0];
    for (let i = 1; i < 5000; i++) series.push((series[i - 1] ?? 0) + standardNormal(rng));
    const points = turningPoints(series, 3, { from: 0, to: series.length - 1 });
    expect(points.length).toBeGreaterThan(100);
    for (let i = 1; i < points.length; i++) {
      const [a, b] = [points[i - 1], points[i]];
      expect(a?.kind).not.toBe(b?.kind);
      expect(
        Math.abs((series[a?.index ?? -1] ?? NaN) - (series[b?.index ?? -1] ?? NaN)),
      ).toBeGreaterThanOrEqual(3);
    }
  });

  it("are none on a flat or empty series", () => {
    expect(turningPoints([2, 2, 2], 1, { from: 0, to: 2 })).toEqual([]);
    expect(turningPoints([], 1, { from: 0, to: -1 })).toEqual([]);
  });
});

describe("means and runs", () => {
  it("keep the mean of a line away from its ends and a constant everywhere", () => {
    expect(movingMean([0, 1, 2, 3, 4], 1).slice(1, 4)).toEqual(Float64Array.of(1, 2, 3));
    expect(Array.from(movingMean([5, 5, 5], 7))).toEqual([5, 5, 5]);
  });

  it("find runs up to the last element", () => {
    expect(runs(4, (i) => i >= 2)).toEqual([{ from: 2, to: 3 }]);
    expect(runs(0, () => true)).toEqual([]);
  });
});

describe("seeded randomness", () => {
  it("repeats itself and is standard normal in its first two moments", () => {
    const a = seededRng(42);
    const b = seededRng(42);
    const draws = Array.from({ length: 20_000 }, () => standardNormal(a));
    expect(draws.slice(0, 5)).toEqual(Array.from({ length: 5 }, () => standardNormal(b)));
    const mean = draws.reduce((sum, x) => sum + x, 0) / draws.length;
    const variance = draws.reduce((sum, x) => sum + x * x, 0) / draws.length;
    // Closed form: standard errors 1 / sqrt(n) = 0.007 and sqrt(2 / n) = 0.01; four of them.
    expect(Math.abs(mean)).toBeLessThan(0.03);
    expect(Math.abs(variance - 1)).toBeLessThan(0.04);
  });
});
