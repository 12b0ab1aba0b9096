import { describe, expect, it } from "vitest";
import { excessOfMaximum } from "./excess-of-maximum";

describe("excessOfMaximum", () => {
  // Expected largest of n standard normals: H. L. Harter 1961, Biometrika 48, table 1 (five decimals; from memory,
  // n = 2 is 1/sqrt(pi) and n = 3 is 3/(2 sqrt(pi)) in closed form).
  it.each([
    [2, 1 / Math.sqrt(Math.PI)],
    [3, 3 / (2 * Math.sqrt(Math.PI))],
    [5, 1.16296],
    [10, 1.53875],
    [20, 1.86748],
  ])("is the tabulated mean of the largest of %i equal rivals", (n, expected) => {
    const rivals = Array.from({ length: n }, () => 7);
    // 1e-4: the step of the integral.
    expect(excessOfMaximum(rivals, 2) / 2).toBeCloseTo(expected, 4);
  });

  it("is next to nothing when the fastest stands six standard errors clear", () => {
    expect(excessOfMaximum([10, 4, 4, 4], 1)).toBeLessThan(1e-4);
  });

  it("is nothing without a rival or without an error", () => {
    expect([excessOfMaximum([], 1), excessOfMaximum([3], 1), excessOfMaximum([3, 3], 0)]).toEqual([0, 0, 0]);
  });
});
